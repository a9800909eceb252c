// SPDX-License-Identifier: GPL-3.0-or-later
// CGAL's triangular expansion over the edges that stop sight, handing back the bare polygon.
#pragma once

#include <CGAL/Arr_non_caching_segment_traits_2.h>
#include <CGAL/Arrangement_2.h>

#include <map>
#include <vector>

#include "graph.h"

// Stands in for the arrangement into which the expansion writes its answer, and only keeps the corners. Building a real
// arrangement would cost time the other side of a comparison does not spend, and the spikes that the expansion returns
// for walls seen edge-on break an arrangement's rules.
template <class K> class Polygon {
public:
  struct Vertex {
    int target() const { return 0; }
    const Vertex *operator->() const { return this; }
  };
  struct Face_handle {
    bool is_unbounded() const { return false; }
    const Face_handle *operator->() const { return this; }
    Face_handle &operator++() { return *this; }
  };
  typedef int Vertex_handle;

  std::vector<typename K::Point_2> corners;

  void clear() { corners.clear(); }
  int unbounded_face() const { return 0; }
  size_t number_of_faces() const { return 2; }
  Face_handle faces_begin() const { return Face_handle(); }
  int insert_in_face_interior(const typename K::Point_2 &p, int) {
    corners.push_back(p);
    return 0;
  }
  Vertex insert_from_left_vertex(const typename K::Segment_2 &s, int) {
    corners.push_back(s.target());
    return Vertex();
  }
  Vertex insert_from_right_vertex(const typename K::Segment_2 &s, int) {
    corners.push_back(s.target());
    return Vertex();
  }
  void insert_at_vertices(const typename K::Segment_2 &, int, int) {}
};

namespace CGAL {
// The expansion compiles a call to this for needles, which a regularised region has none of. Declared before its header,
// where the name is looked up.
template <class K, class Iterator> void insert_non_intersecting_curves(Polygon<K> &, Iterator, Iterator) {}
} // namespace CGAL

#include <CGAL/Triangular_expansion_visibility_2.h>

template <class K> class Expansion {
public:
  typedef CGAL::Arr_non_caching_segment_traits_2<K> Traits;
  typedef CGAL::Arrangement_2<Traits> Arrangement;
  typedef CGAL::Triangular_expansion_visibility_2<Arrangement, CGAL::Tag_true> Visibility;
  typedef typename Arrangement::Halfedge_const_handle Halfedge;
  typedef typename K::Point_2 Corner;

  // Builds over all edges that stop sight, but for one when its index is given.
  explicit Expansion(const Graph &graph, int without = -1) {
    std::vector<typename K::Segment_2> segments;
    for (size_t i = 0; i < graph.edges.size(); i++) {
      auto &e = graph.edges[i];
      if (!(e.stops & SIGHT) || int(i) == without) continue;
      auto &a = graph.points[e.a], &b = graph.points[e.b];
      segments.emplace_back(Corner(a.x, a.y), Corner(b.x, b.y));
    }
    CGAL::insert_non_intersecting_curves(arrangement, segments.begin(), segments.end());
    visibility.attach(arrangement);
    face = arrangement.faces_begin();
    if (face->is_unbounded()) ++face;
  }

  // The region of an eye on no edge. Which face it is in is of no account to the expansion: it finds the triangle itself.
  const std::vector<Corner> &within(const Corner &eye) {
    visibility.compute_visibility(eye, face, polygon);
    return polygon.corners;
  }

  // The region of an eye inside an edge, or at the edge's target, in the face to the left of the edge.
  const std::vector<Corner> &beside(const Corner &eye, Halfedge edge) {
    visibility.compute_visibility(eye, edge, polygon);
    return polygon.corners;
  }

  Arrangement arrangement;

private:
  Visibility visibility;
  typename Arrangement::Face_const_handle face;
  Polygon<K> polygon;
};
