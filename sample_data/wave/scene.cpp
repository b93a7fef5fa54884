#include "sample_data/wave/scene.h"

#include <algorithm>
#include <cmath>
#include <fstream>
#include <map>
#include <stdexcept>

#include <nlohmann/json.hpp>

namespace strikeplate::wave {

namespace {

using nlohmann::json;

Profile profileFrom(const json& j) {
  return {j.at("x").get<std::vector<double>>(), j.at("elevation").get<std::vector<double>>()};
}

Pulse pulseFrom(const std::string& name) {
  if (name == "square_exponential")
    return Pulse::SquareExponential;
  if (name == "linear_exponential")
    return Pulse::LinearExponential;
  if (name == "raised_cosine")
    return Pulse::RaisedCosine;
  throw std::invalid_argument("no pulse is called " + name);
}

Faults faultsFrom(const json& j) {
  Faults f;
  f.deadTrace = j.value("dead_trace", 0);
  f.reversedTrace = j.value("reversed_trace", 0);
  f.lateShot = j.value("late_shot", 0);
  f.clockError = j.value("clock_error_s", 0.0);
  f.repeatedShot = j.value("repeated_shot", 0);
  f.blows = j.value("blows", 1);
  f.humHz = j.value("hum_hz", 0.0);
  f.airVelocity = j.value("air_wave_m_per_s", 0.0);
  f.delay = j.value("delay_s", 0.0);
  return f;
}

Place onGrid(const Scene& scene, double x) {
  const double h = scene.step;
  const double snapped = std::round(x / h) * h;
  return {snapped, std::round(scene.ground.at(snapped) / h) * h};
}

void readGrid(const json& j, Scene& scene) {
  const json grid = j.value("grid", json::object());
  scene.step = grid.value("spacing_m", scene.step);
  scene.margin = grid.value("margin_m", scene.margin);
  scene.depth = grid.value("depth_m", scene.depth);
  scene.absorbing = grid.value("absorbing_m", scene.absorbing);
  scene.timesStep = grid.value("times_spacing_m", scene.timesStep);
  const json sampling = j.value("sampling", json::object());
  scene.interval = sampling.value("interval_s", scene.interval);
  scene.length = sampling.value("length_s", scene.length);
  const json source = j.value("source", json::object());
  scene.pulse = pulseFrom(source.value("pulse", "square_exponential"));
  scene.tau = source.value("tau_s", scene.tau);
}

Scene sceneFrom(const json& j) {
  Scene scene;
  scene.name = j.at("scene").get<std::string>();
  scene.title = j.value("title", "");
  scene.note = j.value("note", "");
  for (const json& l : j.at("layers")) {
    scene.layers.push_back({l.at("name").get<std::string>(), l.at("vp").get<double>(), l.at("vs").get<double>(),
                            l.at("rho").get<double>(), l.value("gradient_per_s", 0.0)});
  }
  for (const json& i : j.at("interfaces"))
    scene.interfaces.push_back(profileFrom(i));
  scene.ground = j.contains("ground") ? profileFrom(j.at("ground")) : Profile{{0.0}, {0.0}};
  readGrid(j, scene);
  const json& geophones = j.at("geophones");
  for (int i = 0; i < geophones.at("count").get<int>(); ++i) {
    scene.geophones.push_back(
        onGrid(scene, geophones.at("first_m").get<double>() + i * geophones.at("spacing_m").get<double>()));
  }
  for (const double x : j.at("shots").get<std::vector<double>>())
    scene.shots.push_back(onGrid(scene, x));
  scene.code = j.value("format_code", 2);
  scene.faults = faultsFrom(j.value("faults", json::object()));
  const auto header = j.value("header", std::map<std::string, std::string>{});
  scene.header.assign(header.begin(), header.end());
  return scene;
}

std::string whatIsWrong(const Scene& s) {
  if (s.layers.empty() || s.interfaces.size() + 1 != s.layers.size())
    return "needs one interface fewer than layers";
  if (s.geophones.empty() || s.shots.empty())
    return "needs geophones and shots";
  for (const Layer& l : s.layers) {
    if (!(l.vp > 0.0 && l.vs >= 0.0 && l.vs < 0.8 * l.vp && l.rho > 0.0))
      return "has a layer that no rock can be";
  }
  const auto bad = [](const Profile& p) {
    return p.x.empty() || p.x.size() != p.elevation.size() || !std::is_sorted(p.x.begin(), p.x.end());
  };
  if (bad(s.ground) || std::any_of(s.interfaces.begin(), s.interfaces.end(), bad)) {
    return "has a profile whose x does not rise or does not match its elevations";
  }
  if (!(s.step > 0.0 && s.interval > 0.0 && s.length > s.interval && s.tau > 0.0 && s.timesStep > 0.0)) {
    return "has a step, length or tau that is not greater than zero";
  }
  return "";
}

}  // namespace

double Profile::at(double position) const {
  if (position <= x.front())
    return elevation.front();
  if (position >= x.back())
    return elevation.back();
  const auto right = static_cast<std::size_t>(std::upper_bound(x.begin(), x.end(), position) - x.begin());
  const double share = (position - x[right - 1]) / (x[right] - x[right - 1]);
  return elevation[right - 1] + share * (elevation[right] - elevation[right - 1]);
}

LayeredGround Scene::layered(int count) const {
  LayeredGround g;
  g.layers = count;
  g.ground = [this](double x) { return ground.at(x); };
  for (const Profile& p : interfaces)
    g.interfaces.emplace_back([&p](double x) { return p.at(x); });
  g.velocity = [this](int layer, double, double below) {
    const Layer& l = layers[static_cast<std::size_t>(layer)];
    return l.vp + l.gradient * below;
  };
  return g;
}

std::pair<int, double> Scene::layerAt(double x, double elevation) const {
  int layer = 0;
  double top = ground.at(x);
  for (std::size_t n = 0; n < interfaces.size(); ++n) {
    const double next = std::min(top, interfaces[n].at(x));
    if (elevation > next)
      break;
    layer = static_cast<int>(n) + 1;
    top = next;
  }
  return {layer, top};
}

Result<Scene> readScene(const std::string& path) {
  std::ifstream in(path);
  if (!in)
    return Failure{path + " cannot be opened; check the name of the scene file."};
  try {
    Scene scene = sceneFrom(json::parse(in));
    const std::string wrong = whatIsWrong(scene);
    if (!wrong.empty())
      return Failure{path + " " + wrong + "."};
    return scene;
  } catch (const std::exception& e) {
    return Failure{path + " is not a scene file: " + e.what() + "."};
  }
}

}  // namespace strikeplate::wave
