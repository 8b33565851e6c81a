#include <nlohmann/json.hpp>

#include "cli/answer.hpp"
#include "cli/enclosure_text.hpp"
#include "format/names.hpp"
#include "format/spelling.hpp"
#include "kernel/cycle.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;

constexpr std::size_t kMostCyclePoints = 4096;  // of longer cycles these are the first

Json complex_json(const DiscEnclosure& z) {
  const PartLiterals parts = part_literals(z);
  return {{"re", parts.re}, {"im", parts.im}};
}

void add_rule(Json& json, const Rule& rule) {
  json["rule"] = name_of(rule);
  std::visit(Overloaded{[&](const Escape& by) {
                          json["bits"] = by.bits;
                        },
                        [&](const AttractingDisc& by) {
                          json["period"] = by.period;
                          json["bits"] = by.bits;
                        },
                        [&](const ClosedForm& by) {
                          json["period"] = by.period;
                        },
                        [](const RealSegment&) {},
                        [&](const Preperiodic& by) {
                          json["preperiod"] = by.preperiod;
                          json["period"] = by.period;
                        }},
             rule);
}

void add_proof(Json& json, const Answer& answer, const Proof& proof) {
  if (const auto* count = std::get_if<Count>(&proof.statement)) {
    json["index"] = count->index;
    json["bailout"] = spell(count->bailout);
  }
  add_rule(json, proof.by);
  if (std::holds_alternative<Member>(proof.statement)) json["why"] = reason_in_words(proof);
  if (!std::holds_alternative<Inside>(proof.statement)) return;
  const auto cycle = enclose_cycle(answer.c, proof.by, kMostCyclePoints);
  if (!cycle) return;
  json["multiplier"] = complex_json(cycle->multiplier);
  json["cycle"] = Json::array();
  for (const DiscEnclosure& z : cycle->points) json["cycle"].push_back(complex_json(z));
}

void add_undecided(Json& json, const Undecided& undecided) {
  static constexpr const char* kLimits[] = {"iterations", "precision", "time"};
  json["limit"] = kLimits[static_cast<std::size_t>(undecided.limit)];
  json["iterations"] = undecided.iterations;
  json["bits"] = undecided.bits;
}

}  // namespace

std::string answer_json(const Answer& answer) {
  Json json{{"line", answer.asked.line}, {"point", answer.asked.text}};
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
