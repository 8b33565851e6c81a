#include "kernel/region.hpp"

#include "kernel/overloaded.hpp"

namespace merestone {

ComplexDyadic centre_of(const Box& box) {
  return {(box.lo.re + box.hi.re).shifted(-1), (box.lo.im + box.hi.im).shifted(-1)};
}

std::array<Box, 4> quarters_of(const Box& box) {
  const auto& [lo, hi] = box;
  const ComplexDyadic middle = centre_of(box);
  return {Box{lo, middle}, Box{{middle.re, lo.im}, {hi.re, middle.im}}, Box{{lo.re, middle.im}, {middle.re, hi.im}},
          Box{middle, hi}};
}

Box bounding_box(const Region& region) {
  return std::visit(Overloaded{[](const Point&) { return Box{}; },
                               [](const Segment& segment) { return Box{{segment.lo, Dyadic()}, {segment.hi, Dyadic()}}; },
                               [](const Disc& disc) {
                                 const auto& [centre, radius] = disc;
                                 return Box{{centre.re - radius, centre.im - radius},
                                            {centre.re + radius, centre.im + radius}};
                               },
                               [](const Box& box) { return box; }},
                    region);
}

}  // namespace merestone
