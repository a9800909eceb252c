// SPDX-License-Identifier: GPL-3.0-or-later
#include "sight.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

Sight::Sight(const Field &f) : field(f), whole(f.graph) {
  for (size_t i = 0; i < f.graph.points.size(); i++) index[{f.graph.points[i].x, f.graph.points[i].y}] = int(i);
  for (auto v = whole.arrangement.vertices_begin(); v != whole.arrangement.vertices_end(); ++v)
    node.emplace(name(v->point()), v);
}

int Sight::name(const ExactPoint &p) const { return index.at({CGAL::to_double(p.x()), CGAL::to_double(p.y())}); }

Sight::Halfedge Sight::halfedge(int from, int to) const {
  auto c = node.at(to)->incident_halfedges(), end = c;
  do
    if (name(c->source()->point()) == from) return c;
  while (++c != end);
  throw std::runtime_error("the arrangement lacks an edge");
}

static bool sameRay(const ExactPoint &eye, const ExactPoint &a, const ExactPoint &b) {
  return a != eye && b != eye && CGAL::collinear(eye, a, b) && CGAL::angle(a, eye, b) == CGAL::ACUTE;
}

// Of neighbouring corners on one ray from the eye only the first and the last count: what lies between is a way out and
// back along a wall seen edge-on (no width, so not part of a regularised region), or a straight point.
static Sector sector(const ExactPoint &eye, const std::vector<ExactPoint> &raw) {
  std::vector<ExactPoint> ring;
  for (auto &p : raw)
    if (ring.empty() || ring.back() != p) ring.push_back(p);
  while (ring.size() > 1 && ring.back() == ring.front()) ring.pop_back();
  size_t n = ring.size(), start = 0;
  while (start < n && sameRay(eye, ring[(start + n - 1) % n], ring[start])) start++;
  std::rotate(ring.begin(), ring.begin() + (start % std::max<size_t>(n, 1)), ring.end());
  Sector s;
  std::vector<bool> radial; // whether the piece that ends at a corner is radial
  for (size_t i = 0; i < n;) {
    size_t j = i;
    while (j + 1 < n && sameRay(eye, ring[j], ring[j + 1])) j++;
    s.corners.push_back(ring[i]), radial.push_back(false);
    if (ring[i] != ring[j]) s.corners.push_back(ring[j]), radial.push_back(true);
    i = j + 1;
  }
  for (size_t i = 0; i < s.corners.size(); i++) {
    size_t j = (i + 1) % s.corners.size();
    s.border.push_back({s.corners[i], s.corners[j], radial[j]});
  }
  return s;
}

std::vector<Sector> Sight::atNode(const ExactPoint &eye, int v) {
  std::vector<Sector> list;
  if (node.at(v)->degree() == 1) {
    // At a free end of a wall the expansion gives an empty answer. Without that wall it gives the right one: seen from its
    // own end a wall is edge-on and hides nothing.
    int other = name(node.at(v)->incident_halfedges()->source()->point()), edge = -1;
    for (size_t i = 0; i < field.graph.edges.size(); i++) {
      auto &e = field.graph.edges[i];
      if ((e.stops & SIGHT) && ((e.a == v && e.b == other) || (e.b == v && e.a == other))) edge = int(i);
    }
    if (!open(v, other)) return list;
    auto &x = without[edge];
    if (!x) x = std::make_unique<Expansion<Exact>>(field.graph, edge);
    list.push_back(sector(eye, x->within(eye)));
    return list;
  }
  auto c = node.at(v)->incident_halfedges(), end = c;
  do
    if (open(name(c->source()->point()), v)) list.push_back(sector(eye, whole.beside(eye, c)));
  while (++c != end);
  return list;
}

std::vector<Sector> Sight::onEdge(const ExactPoint &eye, int e) {
  std::vector<Sector> list;
  int a = field.graph.edges[e].a, b = field.graph.edges[e].b;
  if (open(a, b)) list.push_back(sector(eye, whole.beside(eye, halfedge(a, b))));
  if (open(b, a)) list.push_back(sector(eye, whole.beside(eye, halfedge(b, a))));
  return list;
}

std::vector<Sector> Sight::region(const Point &at) {
  ExactPoint eye(at.x, at.y);
  std::vector<Sector> list;
  Field::Triangles::Locate_type type;
  int i;
  auto f = field.triangles.locate(Fast::Point_2(at.x, at.y), type, i);
  typedef Field::Triangles T;
  int edge = -1;
  if (type == T::EDGE) edge = f->info().edge[i];
  if (type == T::VERTEX) {
    int v = f->vertex(i)->info();
    if (node.count(v)) {
      list = atNode(eye, v);
      if (list.empty()) throw std::runtime_error("inside");
      return list;
    }
    if (size_t(v) >= field.graph.points.size()) {
      for (auto g : field.around(at)) // the middle of a wall that was split
        for (int k = 0; k < 3; k++)
          if (g->vertex(k) != f->vertex(i) && g->info().edge[k] >= 0) edge = g->info().edge[k];
    }
  }
  if (edge >= 0 && (field.graph.edges[edge].stops & SIGHT)) {
    list = onEdge(eye, edge);
    if (list.empty()) throw std::runtime_error("inside");
    return list;
  }
  auto around = field.around(at);
  if (around.empty() || (around[0]->info().solid & SIGHT)) throw std::runtime_error("inside");
  list.push_back(sector(eye, whole.within(eye)));
  return list;
}

static double value(const Number &n) { return CGAL::to_double(n.exact()); }

static double length(const ExactPoint &a, const ExactPoint &b) {
  return std::sqrt(value(CGAL::squared_distance(a, b)));
}

// Cuts out of the piece p, which lies on a ray from the eye, what the pieces of other sectors run back along.
static void cancel(const ExactPoint &eye, const Border &p, const std::vector<const Border *> &others,
                   std::vector<Border> &out) {
  auto way = p.to - p.from;
  Number len2 = way.squared_length();
  auto far = [&](const Border &b) { return b.from == eye ? b.to : b.from; };
  std::vector<std::pair<Number, Number>> gone;
  for (auto q : others) {
    if (!sameRay(eye, far(p), far(*q)) || CGAL::sign(way * (q->to - q->from)) != CGAL::NEGATIVE) continue;
    gone.emplace_back(((q->to - p.from) * way) / len2, ((q->from - p.from) * way) / len2);
  }
  std::sort(gone.begin(), gone.end());
  Number at = 0;
  auto keep = [&](const Number &u, const Number &v) {
    if (u < v) out.push_back({p.from + u * way, p.from + v * way, true});
  };
  for (auto &g : gone) {
    keep(at, (std::min)(g.first, Number(1)));
    at = (std::max)(at, g.second);
  }
  keep(at, 1);
}

std::vector<Border> Sight::outline(const Point &at, const std::vector<Sector> &region) const {
  ExactPoint eye(at.x, at.y);
  std::vector<Border> out;
  std::vector<std::vector<Border>> rays(region.size()); // pieces in line with the eye
  for (size_t i = 0; i < region.size(); i++)
    for (auto &b : region[i].border) {
      if (!CGAL::collinear(eye, b.from, b.to))
        out.push_back(b);
      else if (b.from != eye && b.to != eye && !sameRay(eye, b.from, b.to))
        rays[i].push_back({b.from, eye, true}), rays[i].push_back({eye, b.to, true});
      else
        rays[i].push_back(b);
    }
  for (size_t i = 0; i < region.size(); i++) {
    std::vector<const Border *> others;
    for (size_t k = 0; k < region.size(); k++)
      if (k != i)
        for (auto &b : rays[k]) others.push_back(&b);
    for (auto &p : rays[i]) cancel(eye, p, others, out);
  }
  return out;
}

Measure Sight::measure(const Point &at, const std::vector<Sector> &region) const {
  ExactPoint eye(at.x, at.y);
  Measure m;
  long double area = 0;
  for (auto &s : region)
    for (auto &b : s.border) {
      // All these terms are positive or zero, so their sum loses nothing.
      area += value(CGAL::determinant(b.from - eye, b.to - eye)) / 2;
    }
  m.area = double(area);
  for (auto &b : outline(at, region)) {
    double len = length(b.from, b.to), wall = len;
    m.perimeter += len;
    if (b.radial) {
      Number onWall = 0;
      for (auto &p : field.trace(b.from, b.to)) {
        if (p.side < 0) continue;
        auto f = field.tile[p.tile];
        int other = f->neighbor(p.side)->info().id;
        if ((field.stops(f, p.side) & SIGHT) && (other < 0 || p.tile < other)) onWall += p.v - p.u;
      }
      wall = len * value(onWall);
    }
    m.wall += wall;
    m.occluding += len - wall;
  }
  return m;
}

bool Sight::holds(const Point &at, const std::vector<Sector> &region, const Point &point) const {
  ExactPoint eye(at.x, at.y), p(point.x, point.y);
  for (auto &s : region)
    for (auto &b : s.border) {
      if (CGAL::orientation(eye, b.from, b.to) != CGAL::LEFT_TURN) continue;
      if (CGAL::orientation(eye, b.from, p) != CGAL::RIGHT_TURN && CGAL::orientation(b.from, b.to, p) != CGAL::RIGHT_TURN &&
          CGAL::orientation(b.to, eye, p) != CGAL::RIGHT_TURN)
        return true;
    }
  return false;
}

// Narrows the part u to v of the segment from a to b to what does not lie to the right of the line from p to q.
static void narrow(const ExactPoint &a, const ExactPoint &b, const ExactPoint &p, const ExactPoint &q, Number &u, Number &v) {
  Number from = CGAL::determinant(q - p, a - p), to = CGAL::determinant(q - p, b - p);
  if (from < 0 && to < 0) u = 1, v = 0;
  else if (from < 0) u = (std::max)(u, from / (from - to));
  else if (to < 0) v = (std::min)(v, from / (from - to));
}

Number Sight::share(const Point &at, const std::vector<Sector> &region, const Point &from, const Point &to) const {
  ExactPoint eye(at.x, at.y), a(from.x, from.y), b(to.x, to.y);
  std::vector<std::pair<Number, Number>> parts;
  for (auto &s : region)
    for (auto &p : s.border) {
      if (CGAL::orientation(eye, p.from, p.to) != CGAL::LEFT_TURN) continue;
      Number u = 0, v = 1;
      narrow(a, b, eye, p.from, u, v), narrow(a, b, p.from, p.to, u, v), narrow(a, b, p.to, eye, u, v);
      if (u < v) parts.emplace_back(u, v);
    }
  std::sort(parts.begin(), parts.end());
  Number sum = 0, end = 0;
  for (auto &p : parts) {
    if (p.second > end) sum += p.second - (std::max)(p.first, end), end = p.second;
  }
  return sum;
}

typedef Exact::Vector_2 Vector;

// Adds, for a triangle that has p in its closure, the inward normals of the sides on which p lies; false when p is outside.
static bool normals(const ExactPoint corners[3], const ExactPoint &p, std::vector<Vector> &out) {
  for (int i = 0; i < 3; i++) {
    auto &a = corners[i], &b = corners[(i + 1) % 3];
    auto side = CGAL::orientation(a, b, p);
    if (side == CGAL::RIGHT_TURN) return false;
    if (side == CGAL::COLLINEAR) out.push_back((b - a).perpendicular(CGAL::COUNTERCLOCKWISE));
  }
  return true;
}

// Whether some direction makes an acute angle with every one of these: whether, from one of them, all others lie less than
// half a turn to the left.
static bool common(const std::vector<Vector> &list) {
  if (list.empty()) return true;
  for (auto &first : list) {
    bool all = true;
    for (auto &v : list) {
      auto turn = CGAL::sign(CGAL::determinant(first, v));
      all &= turn == CGAL::POSITIVE || (turn == CGAL::ZERO && CGAL::sign(first * v) == CGAL::POSITIVE);
    }
    if (all) return true;
  }
  return false;
}

bool Sight::beside(const Point &at, const std::vector<Sector> &region, const Point &point, Field::Face tile) const {
  ExactPoint eye(at.x, at.y), p(point.x, point.y);
  ExactPoint floor[3];
  for (int k = 0; k < 3; k++) floor[k] = ExactPoint(tile->vertex(k)->point().x(), tile->vertex(k)->point().y());
  std::vector<Vector> own;
  if (!normals(floor, p, own)) return false;
  for (auto &s : region)
    for (auto &b : s.border) {
      ExactPoint seen[3] = {eye, b.from, b.to};
      std::vector<Vector> both = own;
      if (CGAL::orientation(eye, b.from, b.to) == CGAL::LEFT_TURN && normals(seen, p, both) && common(both)) return true;
    }
  return false;
}
