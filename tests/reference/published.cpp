#include "reference/published.hpp"

#include <fstream>
#include <stdexcept>

namespace reference {

namespace {

mpq_class tenth_power(unsigned n) {
  mpz_class power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, n);
  return mpq_class(mpz_class(1), power);
}

std::string trimmed(const std::string& text) {
  const auto first = text.find_first_not_of(" \t");
  if (first == std::string::npos) return "";
  return text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

AskedPoint asked_point(const std::string& line) {
  const std::string separator = " | ";
  std::vector<std::string> parts;
  for (std::size_t start = 0, end = 0; end != std::string::npos; start = end + separator.size()) {
    end = line.find(separator, start);
    parts.push_back(trimmed(line.substr(start, end == std::string::npos ? end : end - start)));
  }
  if (parts.size() != 5) throw std::runtime_error("points-people-ask.txt: five fields expected in: " + line);
  const std::uint64_t figure = parts[2] == "-" ? 0 : std::stoull(parts[2]);
  return {parts[0], parts[1], figure, parts[3], parts[4]};
}

}  // namespace

const std::vector<EscapeSequence>& published_escape_counts() {
  static const std::vector<EscapeSequence> all = {
      {"OEIS A097486 (verified): c = -3/4 + 10^-n i",
       [](unsigned n) {
         return Complex{ratio(-3, 4), tenth_power(n)};
       },
       {3, 33, 315, 3143, 31417, 314160, 3141593}},
      {"OEIS A299415 (verified): c = 1/4 + 10^-n",
       [](unsigned n) {
         return Complex{ratio(1, 4) + tenth_power(n), 0};
       },
       {2, 8, 30, 97, 312, 991, 3140}},
      {"OEIS A300078 (verified): c = -5/4 - e^2 + e i, e = 10^-n",
       [](unsigned n) {
         return Complex{ratio(-5, 4) - tenth_power(2 * n), tenth_power(n)};
       },
       {1, 18, 159, 1586, 15731}},
  };
  return all;
}

const std::vector<PublishedPoint>& nuclei() {
  static const std::string period_4 =
      "roots of c^6 + 3c^5 + 3c^4 + 3c^3 + 2c^2 + 1 (polynomial verified, digits computed)";
  static const std::vector<PublishedPoint> all = {
      {"z_1 = c", "0", "0", 0, 1},
      {"z_2 = c^2 + c", "-1", "0", 0, 2},
      {"OEIS A109134 negated (verified)", "-1.75487766624669276004950889635852869", "0", 0, 3},
      {"root of c^3 + 2c^2 + c + 1 (computed)", "-0.12256116687665361998", "0.74486176661974423659", 0, 3},
      {period_4, "-1.310702641336832883563571", "0", 0, 4},
      {period_4, "-1.940799806529484752232091", "0", 0, 4},
      {period_4, "0.2822713907669138797", "0.5300606175785252995", 0, 4},
      {period_4, "-0.1565201668337550618", "1.0322471089228318017", 0, 4},
  };
  return all;
}

const std::vector<PublishedPoint>& misiurewicz_points() {
  static const std::vector<PublishedPoint> all = {
      {"exact", "-2", "0", 2, 1},
      {"exact", "0", "1", 2, 2},
      {"OEIS A256099 negated (verified)", "-1.54368901269207636157", "0", 3, 1},
      {"root of c^3 + 2c^2 + 2c + 2 (verified)", "-0.228155493653962", "1.115142508039937", 3, 1},
      {"verified to these digits", "-1.839287", "0", 0, 0},
      {"verified to these digits", "0.419643", "0.606291", 0, 0},
  };
  return all;
}

mpq_class decimal(const std::string& text) {
  const auto point = text.find('.');
  if (point == std::string::npos) return mpq_class(mpz_class(text, 10));
  const std::string digits = text.substr(0, point) + text.substr(point + 1);
  mpq_class value = mpq_class(mpz_class(digits, 10)) * tenth_power(static_cast<unsigned>(text.size() - point - 1));
  value.canonicalize();
  return value;
}

std::vector<AskedPoint> asked_points() {
  std::ifstream file(std::string(MERESTONE_TESTS_DIR) + "/reference/points-people-ask.txt");
  if (!file) throw std::runtime_error("points-people-ask.txt cannot be opened");
  std::vector<AskedPoint> all;
  for (std::string line; std::getline(file, line);)
    if (!trimmed(line).empty() && trimmed(line).front() != '#') all.push_back(asked_point(line));
  return all;
}

}  // namespace reference
