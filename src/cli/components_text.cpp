#include "cli/components_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <nlohmann/json.hpp>

#include "format/literal.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;

struct Words {
  std::string re, im, area;
  const char *place, *appearance;
};

std::string literal(const Bounds& bounds, int digits) { return interval_literal(bounds.lower, bounds.upper, digits); }

// The lower end of [a, inf].
std::string rounded_down(const Dyadic& x, int digits) {
  const std::string interval = interval_literal(x, std::nullopt, digits);
  return interval.substr(1, interval.find(',') - 1);
}

Words words_of(const CatalogueEntry& entry, int digits) {
  const bool is_real = entry.component.is_real();
  return {literal(re_bounds(entry.proved.nucleus), digits),
          is_real ? "[0]" : literal(im_bounds(entry.proved.nucleus), digits), rounded_down(entry.proved.lower, digits),
          is_real ? "real" : "pair", entry.appears_satellite ? "satellite" : "primitive"};
}

// "[a, b]" as "a,b", "[a]" as "a,a"
std::string comma_separated(const std::string& interval) {
  const std::size_t comma = interval.find(", ");
  const std::string first = interval.substr(1, std::min(comma, interval.size() - 1) - 1);
  return comma == interval.npos ? first + "," + first
                                : first + "," + interval.substr(comma + 2, interval.size() - comma - 3);
}

// "[-0.1225611668766, -0.1225611668765]": two numbers of so many digits, with sign, point, zero and exponent.
int width_of_interval(int digits) { return 2 * (digits + 5) + 3; }

}  // namespace

std::string components_heading(ComponentsForm form, int digits) {
  if (form == ComponentsForm::json) return "";
  if (form == ComponentsForm::csv) return "period,place,appears,re_lower,re_upper,im_lower,im_upper,area_lower\n";
  const int width = width_of_interval(digits);
  return fmt::format("{:>6}  {:<5} {:<10} {:<{}} {:<{}} {}\n", "period", "place", "appears", "nucleus, real part",
                     width, "imaginary part", width, "area at least");
}

std::string component_line(const CatalogueEntry& entry, ComponentsForm form, int digits) {
  const Words words = words_of(entry, digits);
  const std::uint32_t period = entry.component.period;
  if (form == ComponentsForm::csv)
    return fmt::format("{},{},{},{},{},{}\n", period, words.place, words.appearance, comma_separated(words.re),
                       comma_separated(words.im), words.area);
  if (form == ComponentsForm::json)
    return Json{{"period", period},
                {"re", words.re},
                {"im", words.im},
                {"real", entry.component.is_real()},
                {"appears", words.appearance},
                {"area_lower", words.area}}
               .dump() +
           "\n";
  const int width = width_of_interval(digits);
  return fmt::format("{:>6}  {:<5} {:<10} {:<{}} {:<{}} {}\n", period, words.place, words.appearance, words.re, width,
                     words.im, width, words.area);
}

ComponentsTotal ComponentsTotal::of(const std::vector<CatalogueEntry>& entries, std::uint32_t most) {
  ComponentsTotal total;
  total.listed = entries.size();
  for (const CatalogueEntry& entry : entries) {
    total.all += entry.component.is_real() ? 1 : 2;
    total.area = total.area + counted_area(entry.component, entry.proved.lower);
  }
  while (total.complete_to < most && is_complete_at(total.complete_to + 1, entries)) ++total.complete_to;
  return total;
}

std::string total_lines(const ComponentsTotal& total, ComponentsForm form, int digits) {
  const std::string area = rounded_down(total.area, digits);
  if (form == ComponentsForm::csv) return "";
  if (form == ComponentsForm::json)
    return Json{{"listed", total.listed},
                {"components", total.all},
                {"area_lower", area},
                {"complete_to", total.complete_to}}
               .dump() +
           "\n";
  std::string text = fmt::format("{} components, {} on or above the real axis; their areas add to at least {}\n",
                                 total.all, total.listed, area);
  if (total.complete_to > 0) text += fmt::format("no other component of a period up to {}\n", total.complete_to);
  return text;
}

}  // namespace merestone
