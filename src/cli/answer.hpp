#pragma once
#include <optional>
#include <string>
#include <variant>

#include "cli/points_input.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// What `merestone decide` has to say about one line: a parameter, or a box or a disc of parameters.
struct Answer {
  PointLine asked;
  ComplexRational c;                          // the parameter that was read, if it is one
  std::optional<Region> region;               // what the verdict about a box or a disc is about
  std::variant<Failure, Verdict> said;
  std::optional<Claim> claim;                 // what the kernel established anew, where it was asked to

  const Failure* failure() const { return std::get_if<Failure>(&said); }
  const Proof* proof() const;
  const Undecided* undecided() const;
};

/// "outside", "inside", "member", "straddles", "undecided" or "error".
std::string verdict_word(const Answer& answer);

/// One line without a newline: the point, the verdict and its reason in a few words.
std::string answer_line(const Answer& answer);
/// The same with the enclosures and the proof on indented lines below; ends in a newline.
std::string answer_paragraph(const Answer& answer);
/// One JSON object on one line, without a newline.
std::string answer_json(const Answer& answer);

/// The reason of a proof in words; empty where the verdict says it all.
std::string reason_in_words(const Proof& proof);
/// The limit that ended an attempt, in words.
std::string limit_in_words(const Undecided& undecided);

}  // namespace merestone
