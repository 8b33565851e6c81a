#include "cli/check_lemmas.hpp"

#include <algorithm>
#include <array>
#include <string_view>

namespace merestone {

namespace {

struct Lemma {
  std::string_view number, words;
};

constexpr std::array kLemmas = {
    Lemma{"B1", "arithmetic of disc enclosures"},
    Lemma{"E1", "radius-2 criterion"},
    Lemma{"E2", "first-order enclosure of the orbit over the region"},
    Lemma{"E3", "disc outside M, from the conformal map of its complement"},
    Lemma{"I1", "attracting disc: theorems of Schwarz-Pick and Fatou"},
    Lemma{"I2", "disc in a hyperbolic component, from its multiplier map: theorem of Douady and Hubbard"},
    Lemma{"I3", "polynomial inequalities of the components of periods 1 and 2"},
    Lemma{"I4", "M meets the real axis in [-2, 1/4]"},
    Lemma{"N1", "exact comparison of regions; a box is its quarters"},
    Lemma{"P1", "preperiodic critical orbit"},
    Lemma{"P2", "nuclei and Misiurewicz points as isolated roots: theorem of Rouch\u00e9"},
    Lemma{"P3", "a connected set that meets M and its complement meets the boundary of M"},
    Lemma{"U1", "disc in the image of a univalent map: theorem of Bieberbach"},
};

}  // namespace

std::string lemma_in_words(const std::string& number) {
  const auto* const found =
      std::find_if(kLemmas.begin(), kLemmas.end(), [&](const Lemma& l) { return l.number == number; });
  if (found == kLemmas.end()) return number;
  return number + " (" + std::string(found->words) + ")";
}

}  // namespace merestone
