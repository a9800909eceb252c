// SPDX-License-Identifier: GPL-3.0-or-later
#include "field.h"

#include <algorithm>
#include <cstdint>
#include <random>
#include <stdexcept>
#include <string>

Field::Field(const Graph &g, const std::vector<Point> &extra) : graph(g) {
  insert(extra);
  for (size_t i = 0; i < g.edges.size(); i++) name(int(i));
  wind();
  check();
  for (auto v : vertex) corner.emplace_back(v->point().x(), v->point().y());
}

// A wall that stands alone, joined to nothing at either end, gets a point in its middle: a slit needs an end on each
// side that its other side does not share, or the two sides of the slit could not be told apart in a mesh.
static std::vector<int> alone(const Graph &g) {
  std::vector<int> degree(g.points.size());
  for (auto &e : g.edges)
    if (e.stops & WALK || !e.winds.empty()) degree[e.a]++, degree[e.b]++;
  std::vector<int> list;
  for (size_t i = 0; i < g.edges.size(); i++)
    if (g.edges[i].stops & WALK && degree[g.edges[i].a] == 1 && degree[g.edges[i].b] == 1) list.push_back(int(i));
  return list;
}

void Field::insert(const std::vector<Point> &extra) {
  std::vector<std::pair<Fast::Point_2, int>> points;
  for (auto &p : graph.points) points.emplace_back(Fast::Point_2(p.x, p.y), int(points.size()));
  triangles.insert(points.begin(), points.end());
  if (triangles.number_of_vertices() != points.size()) throw std::runtime_error("two points at one place");
  vertex.resize(points.size());
  for (auto v : triangles.finite_vertex_handles()) vertex[v->info()] = v;
  for (auto &e : graph.edges) {
    try {
      triangles.insert_constraint(vertex[e.a], vertex[e.b]);
    } catch (...) {
      throw std::runtime_error("edges cross");
    }
  }
  auto more = extra;
  for (int e : alone(graph)) {
    auto &a = graph.points[graph.edges[e].a], &b = graph.points[graph.edges[e].b];
    more.push_back({(a.x + b.x) / 2, (a.y + b.y) / 2});
  }
  for (auto &p : more) {
    size_t before = triangles.number_of_vertices();
    auto v = triangles.insert(Fast::Point_2(p.x, p.y));
    if (triangles.number_of_vertices() == before) continue; // there is a point already
    v->info() = int(vertex.size());
    vertex.push_back(v);
  }
  for (auto f : triangles.finite_face_handles()) {
    f->info().id = int(tile.size());
    tile.push_back(f);
  }
}

// Finds the side that leads from a vertex straight towards another, and returns the vertex at its end.
Field::Vertex Field::step(Vertex from, Vertex to, Face &f, int &i) const {
  auto c = triangles.incident_faces(from), end = c;
  do {
    f = c;
    i = f->cw(f->index(from));
    auto next = f->vertex(f->cw(i));
    if (!triangles.is_infinite(next) && CGAL::collinear(from->point(), next->point(), to->point()) &&
        CGAL::angle(next->point(), from->point(), to->point()) == CGAL::ACUTE)
      return next;
  } while (++c != end);
  throw std::runtime_error("no side lies along an edge");
}

// Names the sides along which an edge lies: one, or several when a point was added to it.
void Field::name(int e) {
  Vertex at = vertex[graph.edges[e].a], to = vertex[graph.edges[e].b];
  while (at != to) {
    Face f;
    int i;
    at = step(at, to, f, i);
    if (at != to && size_t(at->info()) < graph.points.size()) throw std::runtime_error("an edge runs through a point");
    auto m = triangles.mirror_edge({f, i});
    f->info().edge[i] = m.first->info().edge[m.second] = e;
  }
}

namespace {

// Winding numbers about every body at the place where the search stands.
struct Winding {
  const Graph &graph;
  std::vector<int> number;
  int sight = 0, walk = 0; // bodies that stop sight or walking here, the floor apart

  explicit Winding(const Graph &g) : graph(g), number(g.bodies.size()) {}

  void add(const Edge &e, int sign) {
    for (auto &w : e.winds) {
      bool before = number[w.body] != 0;
      number[w.body] += sign * w.delta;
      int change = int(number[w.body] != 0) - int(before);
      if (w.body == 0) continue;
      if (graph.bodies[w.body] & SIGHT) sight += change;
      if (graph.bodies[w.body] & WALK) walk += change;
    }
  }

  int solid() const {
    if (number[0] == 0) return SIGHT | WALK;
    return (sight > 0 ? SIGHT : 0) | (walk > 0 ? WALK : 0);
  }
};

} // namespace

// Carries winding numbers over all triangles, depth first, undoing each step on the way back. A random weight for each
// body sums the winding numbers up, so that a place reached by two ways must carry one sum.
void Field::wind() {
  std::mt19937_64 random(1);
  std::vector<uint64_t> weight(graph.bodies.size());
  for (auto &w : weight) w = random();
  CGAL::Unique_hash_map<Face, uint64_t> sum(0);
  CGAL::Unique_hash_map<Face, bool> seen(false);
  Winding at(graph);
  struct Step {
    Face face;
    int next = 0;  // side to look through
    int edge = -1; // graph edge crossed to come here
    int sign = 0;
  };
  std::vector<Step> path;
  Face outside = triangles.infinite_vertex()->face();
  seen[outside] = true;
  path.push_back({outside});
  outside->info().solid = at.solid();
  while (!path.empty()) {
    auto &s = path.back();
    if (s.next == 3) {
      if (s.edge >= 0) at.add(graph.edges[s.edge], -s.sign);
      path.pop_back();
      continue;
    }
    Face f = s.face;
    int i = s.next++, edge = f->info().edge[i], sign = 0;
    Face to = f->neighbor(i);
    uint64_t total = sum[f];
    if (edge >= 0) {
      auto &e = graph.edges[edge];
      // f lies to the left of the way from corner ccw(i) to corner cw(i): leaving it is a step to the right of that way.
      auto p = f->vertex(f->ccw(i))->point(), q = f->vertex(f->cw(i))->point();
      auto &a = graph.points[e.a], &b = graph.points[e.b];
      bool along = (q.x() - p.x()) * (b.x - a.x) + (q.y() - p.y()) * (b.y - a.y) > 0;
      sign = along ? -1 : 1;
      for (auto &w : e.winds) total += weight[w.body] * uint64_t(int64_t(sign * w.delta));
    }
    if (seen[to]) {
      if (sum[to] != total) throw std::runtime_error("winding numbers do not close");
      continue;
    }
    seen[to] = true;
    sum[to] = total;
    if (edge >= 0) at.add(graph.edges[edge], sign);
    to->info().solid = at.solid();
    path.push_back({to, 0, edge, sign});
  }
}

void Field::check() const {
  for (auto f : triangles.finite_face_handles())
    for (int i = 0; i < 3; i++) {
      int differs = f->info().solid ^ f->neighbor(i)->info().solid;
      if (differs & ~stops(f, i)) throw std::runtime_error("a body's border does not stop what the body stops");
    }
}

std::vector<Field::Face> Field::around(const Point &p) const {
  Triangles::Locate_type type;
  int i;
  Face f = triangles.locate(Fast::Point_2(p.x, p.y), type, i);
  std::vector<Face> list;
  switch (type) {
  case Triangles::FACE:
    list.push_back(f);
    break;
  case Triangles::EDGE:
    list.push_back(f);
    list.push_back(f->neighbor(i));
    break;
  case Triangles::VERTEX: {
    auto c = triangles.incident_faces(f->vertex(i)), end = c;
    do list.push_back(c);
    while (++c != end);
    break;
  }
  default:
    break;
  }
  list.erase(std::remove_if(list.begin(), list.end(), [&](Face g) { return triangles.is_infinite(g); }), list.end());
  return list;
}

Field::Face Field::left(int a, int b) const {
  Face f;
  int i;
  step(vertex[a], vertex[b], f, i);
  return f; // its corners run counter-clockwise from a along the side
}

std::vector<Piece> Field::trace(const ExactPoint &a, const ExactPoint &b) const {
  std::vector<Piece> list;
  double ax = CGAL::to_double(a.x()), ay = CGAL::to_double(a.y());
  double bx = CGAL::to_double(b.x()), by = CGAL::to_double(b.y());
  // The box is a whole unit wider than the rounded line: no triangle that touches it is passed over.
  double x0 = std::min(ax, bx) - 1, x1 = std::max(ax, bx) + 1, y0 = std::min(ay, by) - 1, y1 = std::max(ay, by) + 1;
  double nx = ay - by, ny = bx - ax, len = std::hypot(nx, ny);
  for (Face f : tile) {
    bool out[4] = {true, true, true, true}, over = true, under = true;
    for (int i = 0; i < 3; i++) {
      auto &p = f->vertex(i)->point();
      out[0] &= p.x() < x0, out[1] &= p.x() > x1, out[2] &= p.y() < y0, out[3] &= p.y() > y1;
      double side = (p.x() - ax) * nx + (p.y() - ay) * ny;
      over &= side > len + 1, under &= side < -len - 1;
    }
    if (out[0] || out[1] || out[2] || out[3] || over || under) continue;
    Piece piece{f->info().id, 0, 1, -1};
    bool hit = true;
    for (int i = 0; i < 3 && hit; i++) {
      auto &p = corner[f->vertex(f->ccw(i))->info()], &q = corner[f->vertex(f->cw(i))->info()];
      auto way = q - p;
      Number da = CGAL::determinant(way, a - p), db = CGAL::determinant(way, b - p); // positive inside
      auto sa = CGAL::sign(da), sb = CGAL::sign(db);
      if (sa != CGAL::POSITIVE && sb != CGAL::POSITIVE) {
        hit = sa == CGAL::ZERO && sb == CGAL::ZERO;
        if (hit) piece.side = i;
      } else if (sa == CGAL::NEGATIVE) {
        piece.u = (std::max)(piece.u, Number(da / (da - db)));
      } else if (sb == CGAL::NEGATIVE) {
        piece.v = (std::min)(piece.v, Number(da / (da - db)));
      }
    }
    if (hit && piece.u < piece.v) list.push_back(piece);
  }
  return list;
}
