// SPDX-License-Identifier: GPL-3.0-or-later
#include "timing.h"

#include <algorithm>
#include <chrono>
#include <numeric>
#include <stdexcept>

#include "expansion.h"
#include "geodesics.h"

namespace {

typedef std::chrono::steady_clock Clock;

double since(Clock::time_point t) { return std::chrono::duration<double, std::nano>(Clock::now() - t).count(); }

} // namespace

double timeBuild(const Graph &graph) {
  auto t = Clock::now();
  Expansion<Fast> expansion(graph);
  return since(t);
}

Times timeRegions(const Graph &graph, const std::vector<Point> &eyes) {
  Expansion<Fast> expansion(graph);
  if (eyes.empty()) throw std::runtime_error("no eyes");
  size_t corners = 0;
  for (auto &e : eyes) corners += expansion.within(Fast::Point_2(e.x, e.y)).size();
  std::vector<double> times;
  for (auto &e : eyes) {
    Fast::Point_2 eye(e.x, e.y);
    auto t = Clock::now();
    expansion.within(eye);
    times.push_back(since(t));
  }
  double mean = std::accumulate(times.begin(), times.end(), 0.0) / double(times.size());
  auto middle = times.begin() + times.size() / 2;
  std::nth_element(times.begin(), middle, times.end());
  return {mean, *middle, double(corners) / double(eyes.size())};
}

double timeWalk(const Field &field, const Point &start, const Point &goal) {
  typedef CGAL::Surface_mesh_shortest_path<CGAL::Surface_mesh_shortest_path_traits<Fast, Sheet>> Paths;
  FlatMesh mesh(field);
  auto place = [&](const Point &p) -> Paths::Face_location {
    for (auto f : field.around(p)) {
      int tile = f->info().id;
      if (mesh.face[tile] < 0) continue;
      double share[3], sum = 0;
      for (int k = 0; k < 3; k++) {
        auto a = f->vertex((k + 1) % 3)->point(), b = f->vertex((k + 2) % 3)->point();
        sum += share[k] = (a.x() - p.x) * (b.y() - p.y) - (a.y() - p.y) * (b.x() - p.x);
      }
      auto &t = mesh.turn[tile];
      return {Sheet::Face_index(mesh.face[tile]), {{share[t[0]] / sum, share[t[1]] / sum, share[t[2]] / sum}}};
    }
    throw std::runtime_error("inside");
  };
  auto from = place(start), to = place(goal);
  auto t = Clock::now();
  Paths paths(mesh.sheet);
  paths.add_source_point(from);
  paths.shortest_distance_to_source_points(to.first, to.second);
  return since(t);
}
