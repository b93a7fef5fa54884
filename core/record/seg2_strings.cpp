#include "core/record/seg2_strings.h"

#include <algorithm>
#include <cctype>
#include <cstdint>

#include "core/base/numbers.h"

namespace strikeplate::seg2 {
namespace {

class StringReader {
 public:
  StringReader(std::span<const std::byte> block, ByteOrder order, const Terminators& terminators)
      : block_(block), order_(order), terminators_(terminators) {}

  Strings read() {
    std::size_t at = 0;
    while (at + 2 <= block_.size()) {
      const std::size_t count = countAt(at);
      if (count == 0) {
        break;
      }
      std::size_t next = at + count;
      if (count < 3 || next > block_.size() || !plausible(next)) {
        const std::size_t put = afterTerminator(at + 2);
        if (count < 3 || next > block_.size() || (put != next && plausible(put))) {
          next = put;
          out_.overran = true;
        }
      }
      keep(text(at + 2, next));
      at = next;
    }
    return std::move(out_);
  }

 private:
  [[nodiscard]] std::size_t countAt(std::size_t at) const { return load<std::uint16_t>(block_.data() + at, order_); }

  // Whether the strings may end, or another one may begin, at `at`.
  [[nodiscard]] bool plausible(std::size_t at) const {
    if (at + 2 > block_.size()) {
      return at <= block_.size();
    }
    const std::size_t count = countAt(at);
    return count == 0 || (count >= 3 && at + count <= block_.size() &&
                          std::isalnum(std::to_integer<unsigned char>(block_[at + 2])) != 0);
  }

  [[nodiscard]] std::size_t afterTerminator(std::size_t from) const {
    const std::string_view all(reinterpret_cast<const char*>(block_.data()), block_.size());
    const std::string end = terminators_.string.empty() ? std::string(1, '\0') : terminators_.string;
    const std::size_t found = all.find(end, from);
    return found == std::string_view::npos ? block_.size() : found + end.size();
  }

  [[nodiscard]] std::string_view text(std::size_t from, std::size_t to) const {
    std::string_view content(reinterpret_cast<const char*>(block_.data()) + from, to - std::min(from, to));
    if (!terminators_.string.empty() && content.ends_with(terminators_.string)) {
      content.remove_suffix(terminators_.string.size());
    }
    while (!content.empty() && content.back() == '\0') {
      content.remove_suffix(1);
    }
    return content;
  }

  void keep(std::string_view content) {
    const std::size_t split = std::min(content.find_first_of(std::string_view(" \t\r\n\0", 5)), content.size());
    if (split == 0) {
      return;
    }
    out_.entries.push_back({asUtf8(content.substr(0, split)), value(content.substr(split))});
  }

  // Line ends become '\n'; blanks around the whole are dropped.
  [[nodiscard]] std::string value(std::string_view raw) const {
    std::string lines;
    if (terminators_.line.empty() || terminators_.line == "\n") {
      lines = raw;
    } else {
      for (std::size_t at = 0; at < raw.size();) {
        if (raw.substr(at).starts_with(terminators_.line)) {
          lines += '\n';
          at += terminators_.line.size();
        } else {
          lines += raw[at++];
        }
      }
    }
    return asUtf8(trimmed(lines));
  }

  std::span<const std::byte> block_;
  ByteOrder order_;
  const Terminators& terminators_;
  Strings out_;
};

// Length of the UTF-8 sequence that starts the text, 0 if none does.
std::size_t utf8Length(std::string_view text) {
  const auto lead = static_cast<unsigned char>(text[0]);
  const std::size_t length = lead < 0x80 ? 1 : lead >= 0xC2 && lead < 0xE0 ? 2 : lead >= 0xE0 && lead < 0xF0 ? 3 : 0;
  if (length == 0 || length > text.size()) {
    return 0;
  }
  for (std::size_t i = 1; i < length; ++i) {
    if ((static_cast<unsigned char>(text[i]) & 0xC0) != 0x80) {
      return 0;
    }
  }
  return length;
}

bool isUtf8(std::string_view text) {
  while (!text.empty()) {
    const std::size_t length = utf8Length(text);
    if (length == 0) {
      return false;
    }
    text.remove_prefix(length);
  }
  return true;
}

}  // namespace

Strings parseStrings(std::span<const std::byte> strings, ByteOrder order, const Terminators& terminators) {
  return StringReader(strings, order, terminators).read();
}

std::optional<std::string_view> find(const std::vector<HeaderEntry>& entries, std::string_view keyword) {
  const std::string wanted = lowered(keyword);
  for (const HeaderEntry& entry : entries) {
    if (entry.key.size() == wanted.size() && lowered(entry.key) == wanted) {
      return entry.value;
    }
  }
  return std::nullopt;
}

std::string asUtf8(std::string_view text) {
  std::string out;
  const bool whole = isUtf8(text);
  for (const char c : text) {
    const auto code = static_cast<unsigned char>(c);
    if (code == 0 || (code < 0x20 && c != '\n' && c != '\t')) {
      out += ' ';
    } else if (code < 0x80 || whole) {
      out += c;
    } else {
      out += static_cast<char>(0xC0 | (code >> 6));
      out += static_cast<char>(0x80 | (code & 0x3F));
    }
  }
  return out;
}

}  // namespace strikeplate::seg2
