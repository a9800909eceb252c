// SPDX-License-Identifier: GPL-3.0-or-later
#include "walk.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>

#include "geodesics.h"

// to_double of a lazy number is only as near as its interval is narrow.
static double value(const Number &n) { return CGAL::to_double(n.exact()); }

static const double none = std::numeric_limits<double>::infinity();

Walk::Walk(const Graph &graph, const Point &start)
    : from(start), field(graph, {start}), geodesics(new Geodesics(field)) {
  bool stands = false;
  for (auto f : field.around(from))
    if (!(f->info().solid & WALK)) geodesics->add(f->info().id, from.x, from.y), stands = true;
  if (!stands) throw std::runtime_error("inside");
}

Walk::~Walk() {}

double Walk::to(const Point &p) const {
  double best = none;
  bool stands = false;
  for (auto f : field.around(p))
    if (!(f->info().solid & WALK)) best = std::min(best, geodesics->to(f->info().id, p.x, p.y)), stands = true;
  if (!stands) throw std::runtime_error("inside");
  return best;
}

// The border of a region cut up by the triangles of the floor: whatever of it lies on walkable floor and not along an edge
// that stops walking leads in. That is every occluding edge, and every screen that borders the region.
std::vector<Walk::Entrance> Walk::entrances(const std::vector<Border> &border) const {
  std::vector<Entrance> list;
  for (auto &b : border)
    for (auto &p : field.trace(b.from, b.to)) {
      auto f = field.tile[p.tile];
      if ((f->info().solid & WALK) || (p.side >= 0 && (field.stops(f, p.side) & WALK))) continue;
      auto u = b.from + p.u * (b.to - b.from), v = b.from + p.v * (b.to - b.from);
      list.push_back({p.tile, value(u.x()), value(u.y()), value(v.x()), value(v.y())});
    }
  return list;
}

// A shortest walk to a straight way in ends at one of its ends or, its last leg coming from some corner of the floor or
// from the start, at a right angle to it; so it is enough to look at the ends and at the feet of perpendiculars from all
// corners. Walking there by way of the corner may be blocked, but a foot is a point of the region all the same, so no foot
// gives too short a length; and "distance to the corner plus perpendicular" bounds it from below, which orders the search.
End Walk::approach(Sight &sight, const Point &target) const {
  auto region = sight.region(target);
  for (auto f : field.around(from))
    if (!(f->info().solid & WALK) && sight.beside(target, region, from, f)) return {0, from.x, from.y};
  End best{none, 0, 0};
  auto offer = [&](int tile, double x, double y) {
    double d = geodesics->to(tile, x, y);
    if (d < best.length) best = {d, x, y};
  };
  auto ways = entrances(sight.outline(target, region));
  for (auto &w : ways) offer(w.tile, w.ax, w.ay), offer(w.tile, w.bx, w.by);
  struct Foot {
    double bound;
    int tile;
    double x, y;
  };
  std::vector<Foot> feet;
  auto roots = geodesics->roots();
  roots.push_back({from.x, from.y, 0});
  for (auto &w : ways) {
    double dx = w.bx - w.ax, dy = w.by - w.ay, len2 = dx * dx + dy * dy;
    if (len2 == 0) continue;
    for (auto &r : roots) {
      double t = ((r.x - w.ax) * dx + (r.y - w.ay) * dy) / len2;
      if (!(t > 0 && t < 1)) continue;
      double x = w.ax + t * dx, y = w.ay + t * dy, bound = r.d + std::hypot(x - r.x, y - r.y);
      if (bound < best.length) feet.push_back({bound, w.tile, x, y});
    }
  }
  std::sort(feet.begin(), feet.end(), [](const Foot &a, const Foot &b) { return a.bound < b.bound; });
  for (auto &f : feet) {
    if (f.bound >= best.length) break;
    offer(f.tile, f.x, f.y);
  }
  return best;
}

std::pair<double, double> Walk::judge(Sight &sight, const Point &target, double x, double y) const {
  auto ways = entrances(sight.outline(target, sight.region(target)));
  double off = none, walked = none;
  for (auto &w : ways) {
    double dx = w.bx - w.ax, dy = w.by - w.ay, len2 = dx * dx + dy * dy;
    double t = len2 == 0 ? 0 : std::clamp(((x - w.ax) * dx + (y - w.ay) * dy) / len2, 0.0, 1.0);
    double px = w.ax + t * dx, py = w.ay + t * dy, d = std::hypot(x - px, y - py);
    // Ways that meet at one point lie in different triangles, perhaps on two sides of a wall: the shortest walk counts.
    if (d > off + 1e-6) continue;
    double to = geodesics->to(w.tile, px, py);
    if (d < off - 1e-6 || to < walked) walked = to;
    off = std::min(off, d);
  }
  return {off, walked};
}
