#include "cli/check_bibliography.hpp"

#include <fmt/format.h>

#include <array>
#include <string_view>

namespace merestone {

namespace {

/// Whatever is not ASCII is spelled twice.
struct Entry {
  std::string_view key, cited, authors, title, title_tex, rest;
};

// In the order of Source.
const std::array kEntries = {
    Entry{"Bieberbach1916", "Bieberbach 1916", "L. Bieberbach",
          "\u00dcber die Koeffizienten derjenigen Potenzreihen, welche eine schlichte Abbildung des Einheitskreises "
          "vermitteln",
          "\\\"Uber die Koeffizienten derjenigen Potenzreihen, welche eine schlichte Abbildung des Einheitskreises "
          "vermitteln",
          "1916"},
    Entry{"DouadyHubbard1982", "Douady and Hubbard 1982", "A. Douady and J. H. Hubbard",
          "It\u00e9ration des polyn\u00f4mes quadratiques complexes",
          "It\\'eration des polyn\\^omes quadratiques complexes", "1982"},
    Entry{"DouadyHubbard1984", "Douady and Hubbard 1984-85", "A. Douady and J. H. Hubbard",
          "\u00c9tude dynamique des polyn\u00f4mes complexes", "\\'Etude dynamique des polyn\\^omes complexes",
          "Orsay, 1984-85"},
    Entry{"Duren1983", "Duren 1983", "P. Duren", "Univalent Functions", "Univalent Functions", "1983"},
    Entry{"Johansson2017", "Johansson 2017", "F. Johansson",
          "Arb: efficient arbitrary-precision midpoint-radius interval arithmetic",
          "Arb: efficient arbitrary-precision midpoint-radius interval arithmetic", "IEEE Trans. Computers 66, 2017"},
    Entry{"Milnor", "Milnor", "J. Milnor", "Dynamics in One Complex Variable", "Dynamics in One Complex Variable", ""},
};

const Entry& entry_of(Source source) { return kEntries.at(static_cast<std::size_t>(source)); }

std::string after_title(const Entry& entry) { return entry.rest.empty() ? "." : fmt::format(", {}.", entry.rest); }

}  // namespace

std::string short_citation(Source source) { return std::string(entry_of(source).cited); }

std::string bibitem_key(Source source) { return fmt::format("merestone-{}", entry_of(source).key); }

std::string bibliography_text(const std::set<Source>& sources) {
  if (sources.empty()) return "";
  std::string text = "Sources\n";
  for (const Source source : sources) {
    const Entry& entry = entry_of(source);
    text += fmt::format("  {}, {}{}\n", entry.authors, entry.title, after_title(entry));
  }
  return text;
}

std::string bibliography_tex(const std::set<Source>& sources) {
  if (sources.empty()) return "";
  std::string text = "\\begin{thebibliography}{9}\n";
  for (const Source source : sources) {
    const Entry& entry = entry_of(source);
    text += fmt::format("\\bibitem{{{}}} {}, \\emph{{{}}}{}\n", bibitem_key(source), entry.authors, entry.title_tex,
                        after_title(entry));
  }
  return text + "\\end{thebibliography}\n";
}

}  // namespace merestone
