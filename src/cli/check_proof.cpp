#include "cli/check_proof.hpp"

#include <fmt/format.h>

#include "cli/shared_pieces.hpp"
#include "cli/check_statement.hpp"
#include "format/shown.hpp"
#include "kernel/primes.hpp"
#include "kernel/work.hpp"

namespace merestone {

namespace {

/// The proof of one claim, rule by rule.
class Proof {
 public:
  Proof(const Claim& claim, Notation& n)
      : claim_(claim), n_(n), is_point_(std::holds_alternative<Point>(claim.region)) {}

  std::string operator()(const Escape& by) const;
  std::string operator()(const AttractingDisc& by) const;
  std::string operator()(const ClosedForm& by) const;
  std::string operator()(const RealSegment&) const;
  std::string operator()(const Preperiodic& by) const;
  std::string operator()(const ExteriorDisc& by) const;
  std::string operator()(const InteriorDisc& by) const;
  std::string operator()(const IsolatedRoot& by) const;
  std::string operator()(const Witnesses& by) const;
  std::string operator()(const Quarters& by) const;

 private:
  std::string throughout() const { return is_point_ ? "" : " for every " + n_.c() + " of the region"; }
  std::string subject() const { return is_point_ ? "the parameter of the claim" : "the region"; }
  std::string formula(const std::string& inside) const { return n_.formula(inside); }
  std::string modulus(const std::string& index) const { return "|" + n_.z(index) + "|"; }
  std::string ball_arithmetic(const std::string& bits) const {
    return fmt::format("ball arithmetic of {} bits{}", bits, n_.cite({Source::johansson}));
  }
  std::string bieberbach() const {
    return "Bieberbach's theorem on the second coefficient of univalent functions" +
           n_.cite({Source::bieberbach, Source::duren});
  }
  std::string exterior_map() const {
    return "a univalent map into the complement of the Mandelbrot set that the conformal map of that complement onto "
           "the "
           "outside of the unit disc" +
           n_.cite({Source::douady_hubbard_1982}) + " yields";
  }
  std::string multiplier_theorem() const { return n_.cite({Source::douady_hubbard_1984, Source::milnor}); }
  std::string maps_into_itself(const AttractingDisc& by) const;
  std::string root_of_nucleus(std::uint64_t period) const;
  std::string root_of_misiurewicz(const Misiurewicz& type) const;
  std::string on_pieces(RuleKind rule) const;

  const Claim& claim_;
  Notation& n_;
  bool is_point_;
};

std::string Proof::operator()(const Escape& by) const {
  const std::string head =
      fmt::format("enclosures of the critical orbit in {} show ", ball_arithmetic(std::to_string(by.bits)));
  const auto* const count = std::get_if<Count>(&claim_.statement);
  if (count == nullptr)
    return fmt::format("{}{}{}, and a critical orbit that leaves the disc {} is unbounded", head,
                       formula(modulus(std::to_string(by.index)) + " > 2"), throughout(),
                       formula("|z|" + n_.at_most() + "2"));
  const std::string bailout = n_.number(count->bailout);
  return fmt::format("{}{} and {}{}, and from the first modulus above {} on the moduli increase strictly", head,
                     formula(modulus(std::to_string(count->index - 1)) + n_.at_most() + bailout),
                     formula(modulus(std::to_string(count->index)) + " > " + bailout), throughout(), formula("2"));
}

std::string Proof::maps_into_itself(const AttractingDisc& by) const {
  return fmt::format("{} maps the disc {} into its own interior", formula(n_.iterate(by.period)),
                     formula(n_.disc('z', by.disc)));
}

std::string Proof::operator()(const AttractingDisc& by) const {
  return fmt::format(
      "enclosures in {} show that {}{}, so by the theorem of Schwarz and Pick the disc contains a point of an "
      "attracting "
      "cycle, whose period is exactly {}, and by Fatou's theorem{} the critical orbit converges to this cycle; so it "
      "does "
      "for all parameters nearby",
      ball_arithmetic(std::to_string(by.bits)), maps_into_itself(by), throughout(), by.period,
      n_.cite({Source::milnor}));
}

std::string Proof::operator()(const ClosedForm& by) const {
  const std::string relation = std::holds_alternative<Inside>(claim_.statement) ? " < " : n_.at_most();
  const std::string squares = n_.pick("(x - 1/4)^2 + y^2", "(x - \\frac{1}{4})^2 + y^2");
  const std::string name = by.period == 1 ? "main cardioid" : "component of period 2";
  const std::string with_q = by.period == 1 ? " and " + formula("q = " + squares) : "";
  const std::string inequality = by.period == 1 ? n_.pick("q (q + x - 1/4)", "q (q + x - \\frac{1}{4})") + relation +
                                                      n_.pick("y^2/4", "\\frac{1}{4} y^2")
                                                : "(x + 1)^2 + y^2" + relation + n_.fraction("1", "16");
  return fmt::format("with {}{}, the inequality {}, which describes the {}{}, holds{} by exact arithmetic",
                     formula("c = x + i y"), with_q, formula(inequality), name,
                     std::holds_alternative<Inside>(claim_.statement) ? "" : " with its boundary", throughout());
}

std::string Proof::operator()(const RealSegment&) const {
  const bool is_member = std::holds_alternative<Member>(claim_.statement);
  return fmt::format("the Mandelbrot set meets the real axis exactly in the segment from {} to {}, which {}",
                     formula("-2"), formula(n_.fraction("1", "4")),
                     is_member ? "contains " + subject()
                               : (is_point_ ? "does not contain the real number " + n_.c()
                                            : "the region, which is real, does not meet"));
}

std::string Proof::operator()(const Preperiodic& by) const {
  return fmt::format("{} in exact arithmetic, so the critical orbit is finite",
                     formula(n_.z(std::uint64_t{by.preperiod} + by.period) + " = " + n_.z(by.preperiod)));
}

std::string Proof::operator()(const ExteriorDisc& by) const {
  return fmt::format(
      "{}, applied to {}, gives a disc outside the Mandelbrot set that contains {}; the derivatives of this map where "
      "it "
      "takes the value {} are enclosed in {}, from {} and its first two derivatives with respect to {} there",
      bieberbach(), exterior_map(), subject(), formula(n_.complex(by.centre)), ball_arithmetic(std::to_string(by.bits)),
      formula(n_.z(by.index)), n_.c());
}

std::string Proof::operator()(const InteriorDisc& by) const {
  return fmt::format(
      "for {} enclosures in {} show that {}, so this parameter has an attracting cycle, whose period is exactly {}; "
      "the "
      "multiplier of this cycle maps the hyperbolic component of the parameter conformally onto the unit disc{}, and "
      "{}, applied to the "
      "inverse of that map, gives a disc in the component that contains {}",
      formula("c = " + n_.complex(by.centre)), ball_arithmetic(std::to_string(by.cycle.bits)),
      maps_into_itself(by.cycle), by.cycle.period, multiplier_theorem(), bieberbach(), subject());
}

std::string Proof::root_of_nucleus(std::uint64_t period) const {
  std::string others;
  for (const std::uint64_t q : ascending_prime_cofactors(period)) others += ", " + formula(n_.z(q) + n_.differs() + "0");
  return fmt::format(
      "the equation {} has exactly one solution {} in the disc{}", formula(n_.z(period) + " = 0"), n_.c(),
      others.empty() ? "" : ", throughout which moreover" + others.substr(1) + ", so that the period is exact");
}

std::string Proof::root_of_misiurewicz(const Misiurewicz& type) const {
  const auto [k, p] = type;
  std::string others = formula(n_.z(k - 1) + n_.differs() + "0");
  for (const std::uint64_t q : ascending_prime_cofactors(p)) others += ", " + formula(n_.z(k + q) + n_.differs() + n_.z(k));
  return fmt::format(
      "the equation {} has exactly one solution {} in the disc, throughout which moreover {}, so that preperiod and "
      "period "
      "are exact",
      formula(n_.z(k - 1 + p) + " + " + n_.z(k - 1) + " = 0"), n_.c(), others);
}

std::string Proof::operator()(const IsolatedRoot& by) const {
  const auto* const nucleus = std::get_if<Nucleus>(&claim_.statement);
  const std::string root = nucleus != nullptr ? root_of_nucleus(nucleus->period)
                                              : root_of_misiurewicz(std::get<Misiurewicz>(claim_.statement));
  return fmt::format("by Rouch{}'s theorem, with enclosures over the disc in {}, {}", n_.pick("\u00e9", "\\'e"),
                     ball_arithmetic(std::to_string(by.bits)), root);
}

std::string Proof::operator()(const Witnesses& by) const {
  std::string text;
  bool on_boundary = false;
  for (const Claim& witness : by.claims) {
    text += fmt::format("{}{}, since {}; ", text.empty() ? "" : "and ", statement_clause(witness, n_),
                        proof_clause(witness, n_));
    on_boundary |= std::holds_alternative<Misiurewicz>(witness.statement);
  }
  const std::string of_these = by.claims.size() == 1 ? "this disc lies" : "both lie";
  if (on_boundary)
    return fmt::format("{}{} in the region, and a Misiurewicz point is on the boundary of the Mandelbrot set{}", text,
                       of_these, n_.cite({Source::milnor}));
  return fmt::format(
      "{}{} in the region, and a connected set that meets the Mandelbrot set and its complement meets the "
      "boundary of the Mandelbrot set",
      text, of_these);
}

std::string Proof::on_pieces(RuleKind rule) const {
  switch (rule) {
    case RuleKind::escape:
      return "enclosures of the critical orbit, which leaves the disc " + formula("|z|" + n_.at_most() + "2") +
             " and is therefore unbounded";
    case RuleKind::attracting_disc:
      return "attracting cycles: an iterate of " + formula("f_c") +
             " maps a disc into its own interior (theorems of Schwarz and Pick and of Fatou" +
             n_.pick("; Milnor)", n_.cite({Source::milnor}) + ")");
    case RuleKind::closed_form:
      return "the polynomial inequalities of the components of periods 1 and 2, in exact arithmetic";
    case RuleKind::exterior_disc:
      return fmt::format("discs that {} gives, applied to {}", bieberbach(), exterior_map());
    case RuleKind::interior_disc:
      return fmt::format(
          "discs that {} gives, applied to the inverse of the multiplier map of a hyperbolic component, a conformal "
          "map{}",
          bieberbach(), multiplier_theorem());
    default:
      return std::string(name_of(rule));
  }
}

std::string Proof::operator()(const Quarters& by) const {
  const Pieces pieces = pieces_of(by);
  std::string parts;
  for (std::size_t r = 0; r < kRuleKinds; ++r)
    if (pieces.by_rule[r] > 0)
      parts += fmt::format("{}on {} of them by {}", parts.empty() ? "" : "; ", grouped(pieces.by_rule[r]),
                           on_pieces(static_cast<RuleKind>(r)));
  return fmt::format(
      "the box is cut into {} closed boxes, the smallest with {} of its sides, and the statement is proved "
      "on each: {}; enclosures are in {}",
      grouped(pieces.all), formula(n_.number(Dyadic(1.0).shifted(-pieces.depth))), parts,
      ball_arithmetic("at most " + std::to_string(bits_of(claim_))));
}

}  // namespace

std::string proof_clause(const Claim& claim, Notation& notation) {
  return std::visit(Proof(claim, notation), claim.by);
}

}  // namespace merestone
