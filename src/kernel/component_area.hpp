#pragma once
#include "kernel/component.hpp"
#include "kernel/disc_enclosure.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// What is proved of one hyperbolic component (Lemma A2).
struct ComponentArea {
  DiscEnclosure nucleus;          // encloses it; its im is 0 exactly if the nucleus is real
  Dyadic conformal_radius_lower;  // |a_1|; the component contains the open disc of a quarter of that about the nucleus
  Dyadic lower;                   // of the area of this component alone, without its mirror image
};

/// Proves that exactly one nucleus of exact period `period` lies in the entry's disc (Lemma P2), real if im = 0, and
/// bounds the area of its hyperbolic component from below by the first `coefficients` terms of pi sum n |a_n|^2
/// (Lemma A2). The bound may be 0 where precision does not suffice.
/// Work is about period * coefficients^2; it grows with bits.
/// On failure: the entry is out of range, or which inequality was not shown.
Result<ComponentArea> establish_component(const Component& component);

/// The area that the entry contributes: twice the bound of a component in the upper half plane (Lemma A2), exactly.
Dyadic counted_area(const Component& component, const Dyadic& lower);

}  // namespace merestone
