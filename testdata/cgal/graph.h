// SPDX-License-Identifier: GPL-3.0-or-later
// A rounded graph as it comes in on standard input: see README.md for the format.
#pragma once

#include <array>
#include <istream>
#include <utility>
#include <vector>

// What an edge or a body stops.
enum Stops { SIGHT = 1, WALK = 2 };

struct Wind {
  int body;
  int delta; // crossing the edge from its right to its left adds delta to the winding number about the body
};

struct Edge {
  int a, b;
  int stops;
  std::vector<Wind> winds;
};

struct Point {
  double x, y; // grid units: whole numbers, so exact
  bool operator==(const Point &o) const { return x == o.x && y == o.y; }
};

struct Graph {
  std::vector<Point> points;
  std::vector<Edge> edges;
  std::vector<int> bodies; // what each body stops; body 0 is the floor, where a winding number of zero is solid

  // Reads what follows the word "plan"; returns false when the text is cut short.
  bool read(std::istream &in);
};
