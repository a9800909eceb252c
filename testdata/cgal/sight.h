// SPDX-License-Identifier: GPL-3.0-or-later
// Sight regions with exact numbers.
#pragma once

#include <map>
#include <memory>
#include <vector>

#include "expansion.h"
#include "field.h"

// One border piece of a region, from one corner to the next.
struct Border {
  ExactPoint from, to;
  bool radial; // it points away from the eye
};

// What is seen into one free sector around the eye: one sector for an eye on open floor, one on each free side of an edge
// or between two neighbouring edges of a corner. The sectors overlap nowhere.
struct Sector {
  std::vector<ExactPoint> corners; // counter-clockwise, out-and-back spikes taken out
  std::vector<Border> border;
};

struct Measure {
  double area = 0, perimeter = 0, wall = 0, occluding = 0;
};

class Sight {
public:
  explicit Sight(const Field &field);

  // Throws std::runtime_error when the eye is in a body that stops sight or off the floor.
  std::vector<Sector> region(const Point &eye);

  Measure measure(const Point &eye, const std::vector<Sector> &region) const;

  // The border of all sectors together. Where two sectors meet on a ray from the eye, what they share is no border: an eye on
  // a thin wall sees past it on both sides.
  std::vector<Border> outline(const Point &eye, const std::vector<Sector> &region) const;

  // Whether p lies in the closed region.
  bool holds(const Point &eye, const std::vector<Sector> &region, const Point &p) const;

  // Whether the region holds points next to p within a tile that has p in its closure: what a walker sees who stands at p in
  // that tile. Touching the back of a wall, or a body's border from without, is not seeing what is on its other side.
  bool beside(const Point &eye, const std::vector<Sector> &region, const Point &p, Field::Face tile) const;

  // How much of the segment from a to b lies in the closed region, as a share of its length. Exact.
  Number share(const Point &eye, const std::vector<Sector> &region, const Point &a, const Point &b) const;

private:
  typedef Expansion<Exact>::Halfedge Halfedge;

  const Field &field;
  Expansion<Exact> whole;
  std::map<int, std::unique_ptr<Expansion<Exact>>> without; // by the edge left out
  std::map<std::pair<double, double>, int> index;           // of a graph point
  std::map<int, Expansion<Exact>::Arrangement::Vertex_const_handle> node; // of the points where edges stop sight

  Halfedge halfedge(int from, int to) const;
  int name(const ExactPoint &p) const;
  bool open(int from, int to) const { return !(field.left(from, to)->info().solid & SIGHT); }
  std::vector<Sector> atNode(const ExactPoint &eye, int v);
  std::vector<Sector> onEdge(const ExactPoint &eye, int e);
};
