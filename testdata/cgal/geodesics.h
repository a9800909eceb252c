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
  double scale; // of the mesh over the plan, a power of two
  std::vector<int> face;                       // mesh face of each tile, or -1
  std::vector<std::array<int, 3>> turn;        // turn[tile][k]: the tile's corner that is corner k of the mesh face
};

// CGAL's traits with two changes.
//
// CGAL unfolds the surface triangle by triangle into a plane, each laid out beside the last one. Past triangles that are
// long and thin, of which floor plans have many, the rounding errors of that grow until walks cut corners by a visible
// amount. A flat mesh lies unfolded already, so here every triangle is laid out where it is.
//
// CGAL turns walks only at saddles of the surface and at its border. A flat mesh has no saddles, yet the angles about an
// inner vertex add up to a full turn only in exact arithmetic, and a walk that runs straight through such a vertex can be
// lost between the windows on its two sides. A vertex where walks may turn though they need not costs time and changes no
// length, so here every vertex is one.
struct Flat : CGAL::Surface_mesh_shortest_path_traits<Fast, Sheet> {
  struct Is_saddle_vertex {
    template <class... T> bool operator()(T &&...) const { return true; }
  };
  Is_saddle_vertex is_saddle_vertex_object() const { return Is_saddle_vertex(); }

  struct Construct_triangle_3_to_triangle_2_projection {
    Fast::Triangle_2 operator()(const Fast::Triangle_3 &t) const {
      return {{t[0].x(), t[0].y()}, {t[1].x(), t[1].y()}, {t[2].x(), t[2].y()}};
    }
  };
  Construct_triangle_3_to_triangle_2_projection construct_triangle_3_to_triangle_2_projection_object() const {
    return {};
  }

  struct Construct_triangle_3_along_segment_2_flattening {
    Fast::Triangle_2 operator()(const Fast::Triangle_3 &t, std::size_t, const Fast::Segment_2 &) const {
      return Construct_triangle_3_to_triangle_2_projection()(t);
    }
  };
  Construct_triangle_3_along_segment_2_flattening construct_triangle_3_along_segment_2_flattening_object() const {
    return {};
  }
};

struct Geodesics {
  typedef CGAL::Surface_mesh_shortest_path<Flat> Paths;

  struct Root {
    double x, y, d; // a vertex and its distance from the start
  };

  explicit Geodesics(const Field &field);

  // Adds a source at a corner of a tile. Not on a side: CGAL 5.5.1 puts it as far from the side's one end as it should be
  // from the other, because expand_root hands the weight of the first end to expand_edge_root, which takes it for the
  // distance from there.
  void add(int tile, double x, double y);

  double to(int tile, double x, double y); // from the tile, and from across the side on which the place lies
  std::vector<Root> roots();

private:
  const Field &field;
  FlatMesh mesh;
  std::unique_ptr<Paths> paths;

  Paths::Face_location place(int tile, double x, double y) const;
  double corner(int tile, int k);
  double within(int tile, double x, double y);
};
