// SPDX-License-Identifier: GPL-3.0-or-later
// The plan as triangles, each knowing what is solid there: a constrained Delaunay triangulation of the whole graph and
// winding numbers carried from triangle to triangle. It shares nothing with the program under test but the graph.
#pragma once

#include <CGAL/Constrained_Delaunay_triangulation_2.h>
#include <CGAL/Constrained_triangulation_face_base_2.h>
#include <CGAL/Exact_predicates_exact_constructions_kernel.h>
#include <CGAL/Exact_predicates_inexact_constructions_kernel.h>
#include <CGAL/Triangulation_face_base_with_info_2.h>
#include <CGAL/Triangulation_vertex_base_with_info_2.h>

#include <array>
#include <vector>

#include "graph.h"

typedef CGAL::Exact_predicates_inexact_constructions_kernel Fast;
typedef CGAL::Exact_predicates_exact_constructions_kernel Exact;
typedef Exact::Point_2 ExactPoint;
typedef Exact::FT Number;

struct Tile {
  int id = -1;                          // -1 for the triangles outside the hull
  int solid = 0;                        // what the bodies here stop
  std::array<int, 3> edge{{-1, -1, -1}}; // graph edge opposite each corner, or -1
};

// A piece of a straight line inside one triangle, from u to v as shares of the whole; side is the index of the
// triangle's side it runs along, or -1.
struct Piece {
  int tile;
  Number u, v;
  int side;
};

class Field {
public:
  typedef CGAL::Triangulation_vertex_base_with_info_2<int, Fast> Vb;
  typedef CGAL::Constrained_triangulation_face_base_2<Fast> Cb;
  typedef CGAL::Triangulation_face_base_with_info_2<Tile, Fast, Cb> Fb;
  typedef CGAL::Triangulation_data_structure_2<Vb, Fb> Tds;
  typedef CGAL::No_constraint_intersection_requiring_constructions_tag NoCrossings;
  typedef CGAL::Constrained_Delaunay_triangulation_2<Fast, Tds, NoCrossings> Triangles;
  typedef Triangles::Face_handle Face;
  typedef Triangles::Vertex_handle Vertex;

  // Makes the extra points corners of triangles too. Throws std::runtime_error when the graph is not planar, when winds do
  // not close, or when a body has no border.
  explicit Field(const Graph &graph, const std::vector<Point> &extra = {});

  const Graph &graph;
  Triangles triangles;
  std::vector<Vertex> vertex; // of each graph point; points added to split walls and the extra ones follow
  std::vector<Face> tile;     // the triangles within the hull
  std::vector<ExactPoint> corner; // exact twin of each vertex

  int stops(Face f, int i) const { return f->info().edge[i] < 0 ? 0 : graph.edges[f->info().edge[i]].stops; }

  // The triangles whose closure holds p.
  std::vector<Face> around(const Point &p) const;

  // The triangle to the left of the way from point a to point b of the graph, which must be joined.
  Face left(int a, int b) const;

  // The pieces of positive length that the line from a to b cuts from the triangles; a piece along a side comes twice.
  std::vector<Piece> trace(const ExactPoint &a, const ExactPoint &b) const;

private:
  void insert(const std::vector<Point> &extra);
  void name(int edge);
  Vertex step(Vertex from, Vertex to, Face &f, int &i) const;
  void wind();
  void check() const;
};
