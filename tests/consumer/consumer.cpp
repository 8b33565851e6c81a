// Decides a parameter and writes its claim, as a program of somebody else would.
#include <cstdio>

#include "format/claim_json.hpp"
#include "kernel/typed_number.hpp"
#include "search/certify.hpp"
#include "search/decide_point.hpp"

int main() {
  const char* typed = "-0.75+0.1i";
  const auto c = merestone::parse_complex(typed);
  if (!c) return 2;
  const merestone::Verdict verdict = merestone::decide_point(*c, {});
  const auto* proof = std::get_if<merestone::Proof>(&verdict);
  if (proof == nullptr) return 3;
  const auto claim = merestone::certify(*c, typed, *proof, {});
  if (!claim) return 1;
  std::puts(merestone::to_json(*claim).dump().c_str());
}
