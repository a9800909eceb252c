// SPDX-License-Identifier: GPL-3.0-or-later
// Answers questions about floor plans with CGAL, one line for each question: see README.md.

#include <cstdio>
#include <iostream>
#include <memory>
#include <string>

#include "field.h"
#include "sight.h"
#include "timing.h"
#include "walk.h"

namespace {

// One plan and what has been built for it so far.
struct Session {
  Graph graph;
  std::unique_ptr<Field> field;
  std::unique_ptr<Sight> sight;
  std::unique_ptr<Walk> walk;
  Point start{0, 0};

  Field &floor() {
    if (!field) field = std::make_unique<Field>(graph);
    return *field;
  }
  Sight &eye() {
    if (!sight) sight = std::make_unique<Sight>(floor());
    return *sight;
  }
  Walk &from(const Point &p) {
    if (!walk || !(p == start)) walk.reset(), walk = std::make_unique<Walk>(graph, p);
    start = p;
    return *walk;
  }
  void read(std::istream &in) {
    walk.reset(), sight.reset(), field.reset();
    if (!graph.read(in)) throw std::runtime_error("the plan is cut short");
  }
};

Point point(std::istream &in) {
  Point p;
  if (!(in >> p.x >> p.y)) throw std::runtime_error("a point is missing");
  return p;
}

void region(Session &s, std::istream &in) {
  auto eye = point(in);
  auto seen = s.eye().region(eye);
  auto m = s.eye().measure(eye, seen);
  std::printf("%zu %.17g %.17g %.17g %.17g\n", seen.size(), m.area, m.perimeter, m.wall, m.occluding);
}

void ring(Session &s, std::istream &in) {
  auto eye = point(in);
  for (auto &sector : s.eye().region(eye)) {
    std::printf("( ");
    for (auto &b : sector.border)
      std::printf("%.17g %.17g %s ", CGAL::to_double(b.from.x()), CGAL::to_double(b.from.y()), b.radial ? "~" : "-");
    std::printf(") ");
  }
  std::printf("\n");
}

void sees(Session &s, std::istream &in) {
  auto eye = point(in), p = point(in);
  std::printf("%d\n", int(s.eye().holds(eye, s.eye().region(eye), p)));
}

void share(Session &s, std::istream &in) {
  auto eye = point(in), a = point(in), b = point(in);
  auto sum = s.eye().share(eye, s.eye().region(eye), a, b);
  std::printf("%.17g %d\n", CGAL::to_double(sum.exact()), int(sum == 1));
}

void walk(Session &s, std::istream &in) {
  auto from = point(in), to = point(in);
  std::printf("%.17g\n", s.from(from).to(to));
}

void approach(Session &s, std::istream &in) {
  auto from = point(in), target = point(in);
  auto end = s.from(from).approach(s.eye(), target);
  std::printf("%.17g %.17g %.17g\n", end.length, end.x, end.y);
}

void judge(Session &s, std::istream &in) {
  auto from = point(in), target = point(in), first = point(in);
  auto r = s.from(from).judge(s.eye(), target, first.x, first.y);
  std::printf("%.17g %.17g\n", r.first, r.second);
}

void timeRegionsAsked(Session &s, std::istream &in) {
  size_t n;
  in >> n;
  std::vector<Point> eyes;
  while (n-- > 0) eyes.push_back(point(in));
  auto t = timeRegions(s.graph, eyes);
  std::printf("%.17g %.17g %.17g\n", t.mean, t.median, t.corners);
}

void timeWalkAsked(Session &s, std::istream &in) {
  auto from = point(in), to = point(in);
  std::printf("%.17g\n", timeWalk(s.floor(), from, to));
}

void answer(Session &s, const std::string &word, std::istream &in) {
  if (word == "plan") {
    s.read(in);
    std::printf("%zu %zu\n", s.graph.points.size(), s.graph.edges.size());
  } else if (word == "region") region(s, in);
  else if (word == "ring") ring(s, in);
  else if (word == "sees") sees(s, in);
  else if (word == "share") share(s, in);
  else if (word == "walk") walk(s, in);
  else if (word == "approach") approach(s, in);
  else if (word == "judge") judge(s, in);
  else if (word == "time-build") std::printf("%.17g\n", timeBuild(s.graph));
  else if (word == "time-regions") timeRegionsAsked(s, in);
  else if (word == "time-walk") timeWalkAsked(s, in);
  else throw std::runtime_error("unknown question " + word);
}

} // namespace

int main() {
  // std::cin reads numbers slowly while it is tied to the streams of C.
  std::ios::sync_with_stdio(false);
  Session session;
  std::string word;
  while (std::cin >> word) {
    try {
      answer(session, word, std::cin);
    } catch (const std::exception &e) {
      std::printf("error %s\n", e.what());
    }
    std::fflush(stdout);
  }
}
