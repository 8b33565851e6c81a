#include <fmt/format.h>

#include <algorithm>
#include <cctype>
#include <filesystem>

#include "cli/check_proof.hpp"
#include "cli/check_quote.hpp"
#include "cli/check_request.hpp"
#include "cli/check_statement.hpp"
#include "cli/shared_version.hpp"
#include "format/shown.hpp"
#include "kernel/shape.hpp"

namespace merestone {

namespace {

constexpr std::size_t kLongestName = 80, kLongestTyped = 200, kLongestReadable = 24;

bool has_root(const Statement& statement) {
  return std::holds_alternative<Nucleus>(statement) || std::holds_alternative<Misiurewicz>(statement);
}

std::size_t length(const Rational& x) {
  return fmpz_sizeinbase(x.numerator(), 10) + fmpz_sizeinbase(x.denominator(), 10);
}

bool is_readable(const Rectangle& r) {
  return std::max({length(r.x_lo), length(r.x_hi), length(r.y_lo), length(r.y_hi)}) <= kLongestReadable;
}

// Where the root or the region is, in decimals.
std::string place_sentence(const Claim& claim, const Notation& n) {
  const Rectangle r = bounding_rectangle(claim.region);
  const std::string re = n.formula(n.decimals(r.x_lo, r.x_hi)), im = n.formula(n.decimals(r.y_lo, r.y_hi));
  if (has_root(claim.statement)) {
    // a root that is the only one in a disc about a real number is its own conjugate
    if (r.y_lo == -r.y_hi) return fmt::format(" This parameter is real and lies in {} (decimals rounded outward).", re);
    return fmt::format(" Its real part lies in {} and its imaginary part in {} (decimals rounded outward).", re, im);
  }
  if (is_readable(r) || n.has_enclosures()) return "";
  if (r.y_lo.sign() == 0 && r.y_hi.sign() == 0)
    return fmt::format(" In decimals rounded outward, {} lies in {}.", n.c(), re);
  return fmt::format(" In decimals rounded outward, {} lies in {} and {} in {} there.", n.formula(n.re_c()), re,
                     n.formula(n.im_c()), im);
}

std::string around(const Claim& claim) {
  return std::holds_alternative<Straddles>(claim.statement) ? "meets this boundary, too"
                                                            : "contains at least one such parameter";
}

// What follows for the request.
std::string request_sentence(const Claim& claim, const Notation& n) {
  if (!claim.request) return "";
  const std::string typed =
      claim.request->size() > kLongestTyped ? "in the certificate" : "as " + n.typed(*claim.request);
  switch (relation_of_request(claim)) {
    case RequestRelation::same_point:
      return fmt::format(" This parameter was typed {}.", typed);
    case RequestRelation::same_region:
      return fmt::format(" This region was typed {}.", typed);
    case RequestRelation::point_in_region:
      return fmt::format(" The parameter typed {} is one of these.", typed);
    case RequestRelation::part_of_region:
      return fmt::format(" The region typed {} lies within, so that the statement holds for each of its parameters.",
                         typed);
    case RequestRelation::around_region:
      break;
  }
  return fmt::format(" The region typed {} contains this one and therefore {}.", typed, around(claim));
}

std::string capitalised(std::string text) {
  text.front() = static_cast<char>(std::toupper(static_cast<unsigned char>(text.front())));
  return text;
}

std::string note_on_enclosures(const Notation& n) {
  if (!n.has_enclosures()) return "";
  return fmt::format(
      " (A number written {} stands in the certificate exactly; it lies between the decimals {} and {}.)",
      n.formula("[a, b]"), n.formula("a"), n.formula("b"));
}

// The file's name as it may stand in either form; nothing for standard input.
std::string file_reference(const std::string& path, const Notation& n) {
  if (path == "-") return "";
  const std::string name = printable(std::filesystem::path(path).filename().string(), kLongestName);
  return " " + n.pick(name, "\\texttt{" + escaped_for_tex(name) + "}");
}

}  // namespace

Quote quote_of(const CheckedClaim& checked, StatementForm form) {
  const Claim& claim = *checked.claim;
  Notation n(form);
  Quote quote;
  quote.position = checked.position;
  quote.sentences = capitalised(statement_clause(claim, n)) + ".";
  quote.sentences += place_sentence(claim, n) + request_sentence(claim, n);
  quote.sentences += " Proof: " + proof_clause(claim, n) + "." + note_on_enclosures(n);
  for (const std::string& lemma : std::get<Established>(checked.outcome).lemmas)
    quote.lemmas += (quote.lemmas.empty() ? "" : ", ") + lemma;
  quote.cited = n.cited();
  return quote;
}

std::string definitions(StatementForm form) {
  const Notation n(form);
  return fmt::format(
      "{}Here {}, {} and {}; the critical orbit of a complex parameter {} is the sequence of the {}, and the "
      "Mandelbrot set is the set of the {} for which it is bounded. The claims of a certificate are counted "
      "from 0.\n\n",
      n.pick("", fmt::format("% merestone-check {}; plain LaTeX, no package is needed\n", kProgramVersion)),
      n.formula("f_c(z) = z^2 + c"), n.formula(n.z(0) + " = 0"), n.formula(n.z(n.pick("(n+1)", "n+1")) + " = f_c(z_n)"),
      n.c(), n.formula("z_n"), n.c());
}

std::string quote_paragraph(const Quote& quote, const std::string& path, const Sha256& digest, StatementForm form) {
  const Notation n(form);
  return fmt::format(
      "{} (merestone certificate{}, claims-digest {}, claim {}; Lemma{} {} of merestone; "
      "established by merestone-check {}.)\n\n",
      quote.sentences, file_reference(path, n), n.digest(hexadecimal(digest)), quote.position,
      quote.lemmas.find(',') == quote.lemmas.npos ? "" : "s", quote.lemmas, kProgramVersion);
}

std::string bibliography(const std::set<Source>& sources, StatementForm form) {
  return form == StatementForm::text ? bibliography_text(sources) : bibliography_tex(sources);
}

}  // namespace merestone
