// SPDX-License-Identifier: GPL-3.0-or-later
#include "graph.h"

bool Graph::read(std::istream &in) {
  size_t np, ne, nb;
  if (!(in >> np >> ne >> nb)) return false;
  points.resize(np);
  for (auto &p : points)
    if (!(in >> p.x >> p.y)) return false;
  edges.resize(ne);
  for (auto &e : edges) {
    size_t winds;
    if (!(in >> e.a >> e.b >> e.stops >> winds)) return false;
    e.winds.resize(winds);
    for (auto &w : e.winds)
      if (!(in >> w.body >> w.delta)) return false;
  }
  bodies.resize(nb);
  for (auto &b : bodies)
    if (!(in >> b)) return false;
  return true;
}
