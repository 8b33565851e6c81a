#include "cli/decide_tally.hpp"

#include "format/shown.hpp"
#include "kernel/typed_region.hpp"

namespace merestone {

void DecideTally::take(const Answer& answer) {
  const std::string word = verdict_word(answer);
  (word == "outside"     ? outside_
   : word == "inside"    ? inside_
   : word == "member"    ? member_
   : word == "straddles" ? straddles_
   : word == "undecided" ? undecided_
                         : errors_)++;
  if (is_typed_region(answer.asked.text)) ++regions_;
}

std::string DecideTally::what_in_words() const {
  if (regions_ == 0) return all() == 1 ? " parameter:" : " parameters:";
  if (regions_ < all()) return " parameters and regions:";
  return all() == 1 ? " region:" : " regions:";
}

std::string DecideTally::in_words() const {
  std::string text = grouped(all()) + what_in_words();
  const auto add = [&](std::uint64_t n, const char* word) {
    if (n > 0) text += (text.back() == ':' ? " " : ", ") + grouped(n) + " " + word;
  };
  add(outside_, "outside");
  add(inside_, "inside");
  add(member_, "member");
  add(straddles_, straddles_ == 1 ? "straddles" : "straddle");
  add(undecided_, "undecided");
  add(errors_, "malformed");
  return text;
}

}  // namespace merestone
