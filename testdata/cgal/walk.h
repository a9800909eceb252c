// SPDX-License-Identifier: GPL-3.0-or-later
// Shortest walks by CGAL's geodesics on a flat mesh of the walkable floor.
#pragma once

#include <memory>
#include <vector>

#include "field.h"
#include "sight.h"

struct Geodesics; // the mesh and CGAL's sequence tree, kept out of the header because it is slow to compile

// The end of an approach.
struct End {
  double length; // infinite when there is none
  double x, y;   // first sight
};

class Walk {
public:
  // Walks that begin at a point, made a vertex of the mesh. A start on a thin wall or at a node stands on every side of it.
  // Throws std::runtime_error when no floor is there.
  Walk(const Graph &graph, const Point &start);
  ~Walk();

  // The length of the shortest walk to p, infinite when there is none.
  double to(const Point &p) const;

  // The shortest walk to the region seen from the target.
  End approach(Sight &sight, const Point &target) const;

  // Judges a claimed first sight: how far it lies from the nearest way into the region, and the length of the shortest
  // walk to it on the side from which that way leads in.
  std::pair<double, double> judge(Sight &sight, const Point &target, double x, double y) const;

private:
  Point from;
  Field field;
  std::unique_ptr<Geodesics> geodesics;

  // A straight way into a region, within one triangle.
  struct Entrance {
    int tile;
    double ax, ay, bx, by;
  };
  std::vector<Entrance> entrances(const std::vector<Border> &border) const;
};
