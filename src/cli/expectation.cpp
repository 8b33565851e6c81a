#include "cli/expectation.hpp"

namespace merestone {

namespace {

// Every member by these rules is known to lie on the boundary (Lemmas I3, P1); by the real segment nothing is known.
bool known_boundary_point(const Proof& proof) {
  return std::holds_alternative<Member>(proof.statement) && !std::holds_alternative<RealSegment>(proof.by);
}

ExitCode against(const Proof& proof, Expectation expected) {
  const bool outside =
      std::holds_alternative<Outside>(proof.statement) || std::holds_alternative<Count>(proof.statement);
  const bool inside = std::holds_alternative<Inside>(proof.statement);
  // A region that straddles has parameters outside M and members, also boundary points, which are not inside.
  const bool straddles = std::holds_alternative<Straddles>(proof.statement);
  switch (expected) {
    case Expectation::outside:
      return outside ? ExitCode::established : ExitCode::refuted;
    case Expectation::member:
      return outside || straddles ? ExitCode::refuted : ExitCode::established;
    case Expectation::straddles:
      if (straddles || known_boundary_point(proof)) return ExitCode::established;
      return outside || inside ? ExitCode::refuted : ExitCode::undecided;
    case Expectation::inside:
      break;
  }
  if (inside) return ExitCode::established;
  return outside || straddles || known_boundary_point(proof) ? ExitCode::refuted : ExitCode::undecided;
}

}  // namespace

ExitCode exit_code_of(const Answer& answer, const std::optional<Expectation>& expected) {
  if (answer.failure() != nullptr) return ExitCode::malformed;
  if (answer.undecided() != nullptr) return ExitCode::undecided;
  return expected ? against(*answer.proof(), *expected) : ExitCode::established;
}

}  // namespace merestone
