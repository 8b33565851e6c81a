#include "cli/check_text.hpp"

#include <fmt/format.h>

#include "cli/check_facts.hpp"
#include "cli/check_lemmas.hpp"
#include "cli/check_number_words.hpp"
#include "cli/check_rule_words.hpp"
#include "cli/check_words.hpp"
#include "cli/shared_version.hpp"
#include "format/literal.hpp"
#include "format/shown.hpp"
#include "kernel/flint.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

constexpr int kDigits = 12, kMarginDigits = 3;

std::string row(std::string_view head, std::string_view text) { return fmt::format("  {:<13} {}\n", head, text); }

std::string fact_in_words(const Fact& fact) {
  if (!fact.margin) return fact.words;
  return fmt::format("{}, margin in {}", fact.words, interval_literal(*fact.margin, std::nullopt, kMarginDigits));
}

std::string proof_rows(const Claim& claim, const Established& established) {
  std::string text, head = "proved";
  for (const Fact& fact : facts_of(claim, established)) {
    text += row(head, fact_in_words(fact));
    head.clear();
  }
  head = "figures";
  for (const Figure& figure : established.figures) {
    text += row(head, fmt::format("{} in {}", figure.name, interval_literal(figure.lower, figure.upper, kDigits)));
    head.clear();
  }
  std::string lemmas;
  for (const std::string& lemma : established.lemmas) lemmas += (lemmas.empty() ? "" : ", ") + lemma_in_words(lemma);
  return text + row("lemmas", lemmas);
}

std::string outcome_word(const Outcome& outcome) {
  return std::visit(Overloaded{[](const Established&) { return "established"; },
                               [](const NotEstablished&) { return "NOT ESTABLISHED"; },
                               [](const OverLimit&) { return "REFUSED, over the limit"; }},
                    outcome);
}

// What was established says something of what was typed, too: the kernel has compared the two.
std::string typed_as(const CheckedClaim& checked) {
  if (!std::holds_alternative<Established>(checked.outcome)) return shortened(*checked.claim->request);
  return request_in_words(*checked.claim);
}

std::string outcome_rows(const CheckedClaim& checked) {
  return std::visit(Overloaded{[&](const Established& e) { return proof_rows(*checked.claim, e); },
                               [](const NotEstablished& n) {
                                 return row("failed", n.reason) + row("", "this does not say that the claim is false");
                               },
                               [](const OverLimit& o) { return row("refused", o.reason); }},
                    checked.outcome);
}

std::string reason_of(const Outcome& outcome) {
  return std::visit(
      Overloaded{[](const Established&) { return std::string(); }, [](const NotEstablished& n) { return n.reason; },
                 [](const OverLimit& o) { return o.reason; }},
      outcome);
}

}  // namespace

std::string program_in_words() { return fmt::format("merestone-check {}, FLINT {}\n", kProgramVersion, FLINT_VERSION); }

std::string notation_in_words() {
  return "f_c(z) = z^2 + c, z_0 = 0, z_(n+1) = f_c(z_n); M is the set of the c for which the z_n stay bounded.\n"
         "0xMpE is M times 2^E, M in hexadecimal. [a, b] encloses a real number, its ends rounded outward. A margin "
         "is\n"
         "the difference of the two sides of an inequality. Claims are counted from 0. docs/proofs.md has the "
         "lemmas.\n";
}

std::string claim_paragraph(const CheckedClaim& checked) {
  const Claim& claim = *checked.claim;
  std::string text = fmt::format("Claim {}: {}\n", checked.position, outcome_word(checked.outcome));
  text += row("statement", claim_in_words(claim));
  if (const auto decimals = region_in_decimals(claim.region)) text += row("", *decimals);
  if (claim.request) text += row("typed as", typed_as(checked));
  text += row("rule", rule_in_words(claim));
  return text + outcome_rows(checked) + "\n";
}

std::string failure_line(const CheckedClaim& checked) {
  return fmt::format("claim {} {} ({}; {}): {}", checked.position,
                     std::holds_alternative<OverLimit>(checked.outcome) ? "refused" : "not established",
                     claim_in_words(*checked.claim), rule_in_words(*checked.claim), reason_of(checked.outcome));
}

}  // namespace merestone
