#include <nlohmann/json.hpp>

#include "cli/answer.hpp"
#include "cli/enclosure_text.hpp"
#include "cli/shared_pieces.hpp"
#include "format/claim_json.hpp"
#include "format/names.hpp"
#include "format/spelling.hpp"
#include "kernel/cycle.hpp"
#include "kernel/typed_region.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;

constexpr std::size_t kMostCyclePoints = 4096;  // of longer cycles these are the first

Json complex_json(const DiscEnclosure& z) {
  const PartLiterals parts = part_literals(z);
  return {{"re", parts.re}, {"im", parts.im}};
}

struct AddHints {
  Json& json;

  void operator()(const Escape& by) const { json["bits"] = by.bits; }
  void operator()(const AttractingDisc& by) const {
    json["period"] = by.period;
    json["bits"] = by.bits;
  }
  void operator()(const ClosedForm& by) const { json["period"] = by.period; }
  void operator()(const RealSegment&) const {}
  void operator()(const Preperiodic& by) const {
    json["preperiod"] = by.preperiod;
    json["period"] = by.period;
  }
  void operator()(const ExteriorDisc& by) const { json["bits"] = by.bits; }
  void operator()(const InteriorDisc& by) const { (*this)(by.cycle); }
  void operator()(const IsolatedRoot& by) const { json["bits"] = by.bits; }
  void operator()(const Witnesses& by) const {
    json["witnesses"] = Json::array();
    for (const Claim& witness : by.claims) json["witnesses"].push_back(Json::parse(to_json(witness).dump()));
  }
  void operator()(const Quarters& by) const { json["pieces"] = pieces_of(by).all; }
};

void add_rule(Json& json, const Rule& rule) {
  json["rule"] = name_of(rule);
  std::visit(AddHints{json}, rule);
}

void add_proof(Json& json, const Answer& answer, const Proof& proof) {
  if (const auto* count = std::get_if<Count>(&proof.statement)) {
    json["index"] = count->index;
    json["bailout"] = spell(count->bailout);
  }
  add_rule(json, answer.region && answer.claim ? answer.claim->by : proof.by);
  if (std::holds_alternative<Member>(proof.statement)) json["why"] = reason_in_words(proof);
  if (answer.region || !std::holds_alternative<Inside>(proof.statement)) return;
  const auto cycle = enclose_cycle(answer.c, proof.by, kMostCyclePoints);
  if (!cycle) return;
  json["multiplier"] = complex_json(cycle->multiplier);
  json["cycle"] = Json::array();
  for (const DiscEnclosure& z : cycle->points) json["cycle"].push_back(complex_json(z));
}

void add_undecided(Json& json, const Undecided& undecided) {
  static constexpr const char* kLimits[] = {"iterations", "precision", "time", "cells", "depth"};
  json["limit"] = kLimits[static_cast<std::size_t>(undecided.limit)];
  json["iterations"] = undecided.iterations;
  json["bits"] = undecided.bits;
  if (undecided.cells > 0) json["cells"] = undecided.cells;
}

}  // namespace

std::string answer_json(const Answer& answer) {
  Json json{{"line", answer.asked.line}, {is_typed_region(answer.asked.text) ? "region" : "point", answer.asked.text}};
  if (const Failure* failure = answer.failure()) {
    json["error"] = failure->message;
  } else {
    json["verdict"] = verdict_word(answer);
    if (const Proof* proof = answer.proof()) add_proof(json, answer, *proof);
    if (const Undecided* undecided = answer.undecided()) add_undecided(json, *undecided);
  }
  return json.dump(-1, ' ', false, Json::error_handler_t::replace);
}

}  // namespace merestone
