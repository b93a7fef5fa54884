// Drawing 48 traces of 16 000 samples into 1400 x 900 px: the record view against one QCPCurve for each trace.
// Ratios within one run count, not the times themselves. Wanted: at least 5 times faster, and under 8 ms.
#include <cmath>

#include <QApplication>
#include <benchmark/benchmark.h>
#include <qcustomplot.h>

#include "widgets/record_view.h"

namespace {

using namespace strikeplate;

constexpr int kTraces = 48, kSamples = 16000;
constexpr double kInterval = 1.25e-4;

Scene sceneOf() {
  auto survey = std::make_shared<Survey>();
  Shot shot;
  shot.point.x = -5.0;
  Gather gather;
  gather.shot = shot.point;
  gather.sampleInterval = kInterval;
  for (int t = 0; t < kTraces; ++t) {
    survey->geophones.push_back({2.0 * t, 0.0});
    const double onset = 0.01 + 0.002 * t;
    shot.traces.push_back({t, TraceState::Live, "", Pick{onset, 5e-4, 1 + t / 24, PickOrigin::Hand}});
    std::vector<float> samples;
    for (int i = 0; i < kSamples; ++i) {
      const double after = i * kInterval - onset;
      const double ripple = 0.02 * std::sin(0.7 * i + t) + 0.01 * std::sin(2.9 * i * t);
      samples.push_back(static_cast<float>(
          ripple + (after > 0.0 ? std::sin(380.0 * after) * std::exp(-3.0 * after) : 0.0)));
    }
    gather.traces.push_back(std::move(samples));
    gather.states.push_back(TraceState::Live);
  }
  gather.geophones = survey->geophones;
  survey->shots.push_back(shot);
  auto gathers = std::make_shared<std::vector<Gather>>();
  gathers->push_back(std::move(gather));
  return {survey, nullptr, gathers, {0, 10, 0}};
}

/// Everything anew: every step of a zoom, with the whole record in sight.
void drawRecord(benchmark::State& state) {
  RecordView view;
  RecordDisplay display;
  display.style = static_cast<TraceStyle>(state.range(0));
  view.setDisplay(display);
  view.resize(1400, 900);
  view.showScene(sceneOf());
  view.perform(RecordCommand::ZoomAll);
  QImage image(view.size(), QImage::Format_RGB32);
  for (auto step : state) {
    display.gain = display.gain > 1.5 ? 1.0 : 1.01 * display.gain;
    view.setDisplay(display);
    view.render(&image);
  }
}
BENCHMARK(drawRecord)->ArgName("style")->DenseRange(0, 3)->Unit(benchmark::kMillisecond);

/// A pick is dragged: the traces stay as they are.
void drawPickDrag(benchmark::State& state) {
  RecordView view;
  view.resize(1400, 900);
  Scene scene = sceneOf();
  view.showScene(scene);
  QImage image(view.size(), QImage::Format_RGB32);
  view.render(&image);
  for (auto step : state) {
    auto moved = std::make_shared<Survey>(*scene.survey);
    moved->shots[0].traces[10].pick->time += 1e-5;
    scene.survey = moved;
    view.showScene(scene);
    view.render(&image);
  }
}
BENCHMARK(drawPickDrag)->Unit(benchmark::kMillisecond);

void drawCurves(benchmark::State& state) {
  const Scene scene = sceneOf();
  QCustomPlot plot;
  plot.resize(1400, 900);
  plot.xAxis->setRange(0.5, kTraces + 0.5);
  plot.yAxis->setRange(kSamples * kInterval, 0.0);
  for (int t = 0; t < kTraces; ++t) {
    auto* curve = new QCPCurve(plot.xAxis, plot.yAxis);
    QVector<double> x, y;
    const auto& samples = (*scene.gathers)[0].traces[static_cast<std::size_t>(t)];
    for (std::size_t i = 0; i < samples.size(); ++i) {
      x << t + 1 + static_cast<double>(samples[i]);
      y << static_cast<double>(i) * kInterval;
    }
    curve->setData(x, y);
  }
  for (auto step : state) {
    plot.replot(QCustomPlot::rpImmediateRefresh);
  }
}
BENCHMARK(drawCurves)->Unit(benchmark::kMillisecond);

}  // namespace

int main(int argc, char** argv) {
  if (qEnvironmentVariableIsEmpty("QT_QPA_PLATFORM")) {
    qputenv("QT_QPA_PLATFORM", "offscreen");
  }
  const QApplication application(argc, argv);
  benchmark::Initialize(&argc, argv);
  benchmark::RunSpecifiedBenchmarks();
  return 0;
}
