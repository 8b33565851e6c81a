#pragma once
#include <set>
#include <string>

namespace merestone {

/// The sources that the lemmas of docs/proofs.md name, as far as sentences cite them.
enum class Source { bieberbach, douady_hubbard_1982, douady_hubbard_1984, duren, johansson, milnor };

/// The short form for running text, "Duren 1983".
std::string short_citation(Source source);
/// The name of the source's \bibitem.
std::string bibitem_key(Source source);

/// The sources as a list under a heading, or as a thebibliography of LaTeX. Empty for no source.
std::string bibliography_text(const std::set<Source>& sources);
std::string bibliography_tex(const std::set<Source>& sources);

}  // namespace merestone
