#include "cli/decide_tally.hpp"

#include "format/shown.hpp"

namespace merestone {

void DecideTally::take(const Answer& answer) {
  const std::string word = verdict_word(answer);
  (word == "outside"     ? outside_
   : word == "inside"    ? inside_
   : word == "member"    ? member_
   : word == "undecided" ? undecided_
                         : errors_)++;
}

std::string DecideTally::in_words() const {
  std::string text = grouped(all()) + (all() == 1 ? " parameter:" : " parameters:");
  const auto add = [&](std::uint64_t n, const char* word) {
    if (n > 0) text += (text.back() == ':' ? " " : ", ") + grouped(n) + " " + word;
  };
  add(outside_, "outside");
  add(inside_, "inside");
  add(member_, "member");
  add(undecided_, "undecided");
  add(errors_, "malformed");
  return text;
}

}  // namespace merestone
