#include "core/section/hull.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

// A bend must turn by more than rounding does, so that a plane interface is one straight way.
constexpr double kTurn = 1e-9;

}  // namespace

HullTable::HullTable(const Eigen::VectorXd& z, double spacing) {
  const int n = static_cast<int>(z.size());
  length_.resize(n, n);
  previous_.resize(n, n);
  std::vector<int> stack(n);
  std::vector<double> along(n);
  for (int a = 0; a < n; ++a) {
    int top = 0;
    length_(a, a) = 0.0;
    stack[0] = a;
    along[0] = 0.0;
    for (int b = a + 1; b < n; ++b) {
      while (top >= 1) {
        const int p = stack[top - 1];
        const int q = stack[top];
        const double into = (z[q] - z[p]) * (b - q);
        const double out = (z[b] - z[q]) * (q - p);
        if (out - into > kTurn * spacing * (b - p)) {
          break;
        }
        --top;
      }
      const int p = stack[top];
      const double run = (b - p) * spacing;
      const double rise = z[b] - z[p];
      along[top + 1] = along[top] + std::sqrt(run * run + rise * rise);
      stack[++top] = b;
      length_(b, a) = along[top];
      length_(a, b) = along[top];
      previous_(b, a) = p;
    }
  }
}

void HullTable::bends(int a, int b, std::vector<int>& out) const {
  out.clear();
  const int low = std::min(a, b);
  for (int at = std::max(a, b); at > low;) {
    at = previous_(at, low);
    if (at > low) {
      out.push_back(at);
    }
  }
  if (a < b) {
    std::reverse(out.begin(), out.end());
  }
}

}  // namespace strikeplate
