// SPDX-License-Identifier: GPL-3.0-or-later
// The walkable floor as a flat mesh for CGAL::Surface_mesh_shortest_path.
#pragma once

#include <CGAL/Surface_mesh.h>
#include <CGAL/Surface_mesh_shortest_path.h>

#include <memory>
#include <vector>

#include "field.h"

typedef CGAL::Surface_mesh<Fast::Point_3> Sheet;

// The floor's triangles joined across every side that does not stop walking, and across no other: a thin wall becomes a
// slit, and a node where walls meet becomes one vertex for each sector between them, so that no walk passes through it.
struct FlatMesh {
  explicit FlatMesh(const Field &field);

  Sheet sheet;
  std::vector<int> face;                       // mesh face of each tile, or -1
  std::vector<std::array<int, 3>> turn;        // turn[tile][k]: the tile's corner that is corner k of the mesh face
};

// CGAL turns walks only at saddles of the surface and at its border. A flat mesh has no saddles, yet the angles about an
// inner vertex add up to a full turn only in exact arithmetic, and a walk that runs straight through such a vertex can be
// lost between the windows on its two sides. A vertex where walks may turn though they need not costs time and changes no
// length, so here every vertex is one.
struct TurnAnywhere : CGAL::Surface_mesh_shortest_path_traits<Fast, Sheet> {
  struct Is_saddle_vertex {
    template <class... T> bool operator()(T &&...) const { return true; }
  };
  Is_saddle_vertex is_saddle_vertex_object() const { return Is_saddle_vertex(); }
};

struct Geodesics {
  typedef CGAL::Surface_mesh_shortest_path<TurnAnywhere> Paths;

  struct Root {
    double x, y, d; // a vertex and its distance from the start
  };

  explicit Geodesics(const Field &field);

  void clear();
  void add(int tile, double x, double y);
  double to(int tile, double x, double y);
  std::vector<Root> roots();

private:
  const Field &field;
  FlatMesh mesh;
  std::unique_ptr<Paths> paths;

  Paths::Face_location place(int tile, double x, double y) const;
};
