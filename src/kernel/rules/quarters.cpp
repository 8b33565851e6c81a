#include <algorithm>

#include "kernel/dispatch.hpp"
#include "kernel/rules/rules.hpp"

namespace merestone::rules {

namespace {

void merge(std::vector<std::string>& lemmas, const std::vector<std::string>& more) {
  for (const std::string& lemma : more)
    if (std::find(lemmas.begin(), lemmas.end(), lemma) == lemmas.end()) lemmas.push_back(lemma);
}

}  // namespace

Outcome quarters(const Statement& statement, const Region& region, const Quarters& by) {
  const Box* box = std::get_if<Box>(&region);
  if (box == nullptr) return NotEstablished{"the region is not a box"};
  const std::array<Box, 4> quarters = quarters_of(*box);
  Established whole{{}, {"N1"}};
  for (std::size_t i = 0; i < quarters.size(); ++i) {
    const Outcome outcome = establish_by(statement, quarters[i], by.rules[i]);
    if (const auto* refused = std::get_if<NotEstablished>(&outcome))
      return NotEstablished{"quarter " + std::to_string(i) + ": " + refused->reason};
    merge(whole.lemmas, std::get<Established>(outcome).lemmas);
  }
  return whole;
}

}  // namespace merestone::rules
