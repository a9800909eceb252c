// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

#include "field.h"

// All times are nanoseconds on the steady clock.

// Arrangement of the edges that stop sight, and the triangulation made when it is attached, both with the fast kernel.
double timeBuild(const Graph &graph);

struct Times {
  double mean, median;
  double corners; // mean count of corners in the answers
};

// Regions as bare polygons with the fast kernel, point location included, one after the other over all eyes.
Times timeRegions(const Graph &graph, const std::vector<Point> &eyes);

// One geodesic from start to goal: CGAL's sequence tree and its query, mesh ready.
double timeWalk(const Field &field, const Point &start, const Point &goal);
