// SPDX-License-Identifier: GPL-3.0-or-later
#include "geodesics.h"

#include <CGAL/Polygon_mesh_processing/polygon_soup_to_polygon_mesh.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>
#include <stdexcept>

namespace {

// Sets of triangle corners, three to a tile.
struct Sets {
  std::vector<int> parent;
  explicit Sets(size_t n) : parent(n) { std::iota(parent.begin(), parent.end(), 0); }
  int find(int i) {
    while (parent[i] != i) i = parent[i] = parent[parent[i]];
    return i;
  }
  void join(int a, int b) { parent[find(a)] = find(b); }
};

} // namespace

// CGAL holds two rays for one when squares of distances differ by less than 2e-14, whatever the size of the mesh ("relaxed
// pruning", 5.5.1). Floor plans are full of rays that are one, along straight rows of corners, and in whole grid units the
// rounding of such squares is far above that: windows get lost and walks come out too long. So the mesh is made to fit
// into a sixty-fourth of a unit, by a power of two, which rounds nothing.
static double fit(const Field &field) {
  double size = 1;
  for (auto &p : field.graph.points) size = std::max({size, std::abs(p.x), std::abs(p.y)});
  return std::exp2(-6 - std::ceil(std::log2(size)));
}

FlatMesh::FlatMesh(const Field &field) : scale(fit(field)), face(field.tile.size(), -1), turn(field.tile.size()) {
  auto open = [](Field::Face f) { return f->info().id >= 0 && !(f->info().solid & WALK); };
  Sets corners(3 * field.tile.size());
  for (auto f : field.tile)
    for (int i = 0; i < 3; i++) {
      auto g = f->neighbor(i);
      if (!open(f) || !open(g) || (field.stops(f, i) & WALK)) continue;
      for (int k : {f->ccw(i), f->cw(i)})
        corners.join(3 * f->info().id + k, 3 * g->info().id + g->index(f->vertex(k)));
    }
  std::vector<Fast::Point_3> points;
  std::vector<int> name(corners.parent.size(), -1);
  std::vector<std::vector<std::size_t>> polygons;
  std::vector<int> tiles;
  for (auto f : field.tile) {
    if (!open(f)) continue;
    std::vector<std::size_t> polygon;
    for (int k = 0; k < 3; k++) {
      int &n = name[corners.find(3 * f->info().id + k)];
      if (n < 0) {
        n = int(points.size());
        auto p = f->vertex(k)->point();
        points.emplace_back(p.x() * scale, p.y() * scale, 0);
      }
      polygon.push_back(n);
    }
    polygons.push_back(polygon);
    tiles.push_back(f->info().id);
  }
  namespace PMP = CGAL::Polygon_mesh_processing;
  if (!PMP::is_polygon_soup_a_polygon_mesh(polygons)) throw std::runtime_error("the slit floor is no mesh");
  PMP::polygon_soup_to_polygon_mesh(points, polygons, sheet);
  auto f = sheet.faces().begin();
  for (size_t i = 0; i < tiles.size(); i++, ++f) {
    face[tiles[i]] = int(*f);
    auto first = std::size_t(sheet.source(sheet.halfedge(*f)));
    int k = int(std::find(polygons[i].begin(), polygons[i].end(), first) - polygons[i].begin());
    if (k == 3) throw std::runtime_error("the mesh's faces are out of order");
    turn[tiles[i]] = {k, (k + 1) % 3, (k + 2) % 3};
  }
}

Geodesics::Geodesics(const Field &f) : field(f), mesh(f), paths(std::make_unique<Paths>(mesh.sheet)) {}

Geodesics::Paths::Face_location Geodesics::place(int tile, double x, double y) const {
  auto f = field.tile[tile];
  double px[3], py[3], share[3];
  for (int k = 0; k < 3; k++) px[k] = f->vertex(k)->point().x() - x, py[k] = f->vertex(k)->point().y() - y;
  for (int k = 0; k < 3; k++) {
    int a = (k + 1) % 3, b = (k + 2) % 3;
    // A rounded point of the border may come out a hair outside the triangle it is known to lie in.
    share[k] = std::max(0.0, px[a] * py[b] - py[a] * px[b]);
  }
  double sum = share[0] + share[1] + share[2];
  auto &t = mesh.turn[tile];
  return {Sheet::Face_index(mesh.face[tile]), {{share[t[0]] / sum, share[t[1]] / sum, share[t[2]] / sum}}};
}

void Geodesics::add(int tile, double x, double y) { paths->add_source_point(place(tile, x, y)); }

double Geodesics::to(int tile, double x, double y) {
  double best = within(tile, x, y);
  auto f = field.tile[tile];
  for (int i = 0; i < 3; i++) {
    auto p = f->vertex(f->ccw(i))->point(), q = f->vertex(f->cw(i))->point();
    bool on = (q.x() - p.x()) * (y - p.y()) - (q.y() - p.y()) * (x - p.x()) <= 0;
    int other = f->neighbor(i)->info().id;
    if (on && other >= 0 && mesh.face[other] >= 0 && !(field.stops(f, i) & WALK)) best = std::min(best, within(other, x, y));
  }
  return best;
}

// What CGAL tells, in grid units.
static double told(double d, double scale) { return d < 0 ? std::numeric_limits<double>::infinity() : d / scale; }

// The distance of corner k of a tile.
double Geodesics::corner(int tile, int k) {
  auto h = mesh.sheet.halfedge(Sheet::Face_index(mesh.face[tile]));
  for (int i = 0; mesh.turn[tile][i] != k; i++) h = mesh.sheet.next(h);
  return told(paths->shortest_distance_to_source_points(mesh.sheet.source(h)).first, mesh.scale);
}

// A place on the very border of CGAL's windows, such as one on the side along which the walk runs, can fall out of all of
// them by a rounding. So the straight ways within the triangle from its corners are looked at too.
double Geodesics::within(int tile, double x, double y) {
  auto at = place(tile, x, y);
  double best = told(paths->shortest_distance_to_source_points(at.first, at.second).first, mesh.scale);
  for (int k = 0; k < 3; k++) {
    auto p = field.tile[tile]->vertex(k)->point();
    best = std::min(best, corner(tile, k) + std::hypot(p.x() - x, p.y() - y));
  }
  return best;
}

std::vector<Geodesics::Root> Geodesics::roots() {
  std::vector<Root> list;
  for (auto v : mesh.sheet.vertices()) {
    double d = paths->shortest_distance_to_source_points(v).first;
    if (d >= 0) list.push_back({mesh.sheet.point(v).x() / mesh.scale, mesh.sheet.point(v).y() / mesh.scale, d / mesh.scale});
  }
  return list;
}
