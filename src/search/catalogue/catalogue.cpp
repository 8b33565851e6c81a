#include "search/catalogue/catalogue.hpp"

#include <tbb/blocked_range.h>
#include <tbb/parallel_for.h>

#include <algorithm>
#include <atomic>
#include <cmath>
#include <numeric>

#include "search/catalogue/all_nuclei.hpp"
#include "search/catalogue/nucleus_scan.hpp"
#include "search/catalogue/satellites.hpp"

namespace merestone {

namespace {

class Catalogue {
 public:
  Catalogue(const CatalogueOptions& options, const std::function<bool(const CatalogueProgress&)>& go_on)
      : options_(options), go_on_(go_on) {}

  std::vector<CatalogueEntry> run() {
    std::vector<ApproxNucleus> nuclei = all_of_short_periods();
    if (options_.resolution) {
      nuclei.push_back({1, {0, 0}, 0.5});
      nuclei.push_back({2, {-1, 0}, 0.25});
      append(nuclei, scanned());
    }
    take(std::move(nuclei));
    if (options_.resolution) take_satellites();
    return proved();
  }

 private:
  template <class Item>
  static void append(std::vector<Item>& to, const std::vector<Item>& from) {
    to.insert(to.end(), from.begin(), from.end());
  }

  // Calls work(i) for each i below n until the caller has had enough.
  template <class Work>
  void for_each(std::size_t n, Work&& work) {
    tbb::parallel_for(tbb::blocked_range<std::size_t>(0, n, 1), [&](const tbb::blocked_range<std::size_t>& range) {
      for (std::size_t i = range.begin(); i != range.end() && !stopped_; ++i) {
        work(i);
        if (!go_on_({scanned_, rows_, candidates_, proved_})) stopped_ = true;
      }
    });
  }

  // What find(i) returns for each i below n, in the order of i.
  template <class Find>
  std::vector<ApproxNucleus> gathered(std::size_t n, Find&& find) {
    std::vector<std::vector<ApproxNucleus>> parts(n);
    for_each(n, [&](std::size_t i) { parts[i] = find(i); });
    std::vector<ApproxNucleus> all;
    for (const auto& part : parts) append(all, part);
    return all;
  }

  std::vector<ApproxNucleus> all_of_short_periods() {
    return gathered(options_.complete_to,
                    [](std::size_t i) { return approx_nuclei_of_period(static_cast<std::uint32_t>(i) + 1); });
  }

  std::vector<ApproxNucleus> scanned() {
    ScanOptions scan;
    scan.places = (*options_.resolution + 1) / 2 + 2;  // an atom domain is about as large as the root of its component
    scan.least_size = least_size();
    scan.max_period = options_.max_period;
    rows_ = scan_rows(scan);
    return gathered(rows_, [&](std::size_t i) {
      ++scanned_;
      return scan_row(static_cast<std::uint32_t>(i), scan);
    });
  }

  // Adds the components of those nuclei that are not here yet. Returns where they begin.
  std::size_t take(std::vector<ApproxNucleus> nuclei) {
    keep_one_of_each(nuclei);
    std::erase_if(nuclei, [&](const ApproxNucleus& nucleus) { return is_one_of(nucleus, known_); });
    append(known_, nuclei);
    keep_one_of_each(known_);
    const std::size_t first = components_.size();
    components_.resize(first + nuclei.size());
    for_each(nuclei.size(),
             [&](std::size_t i) { components_[first + i] = approx_component(nuclei[i], terms(nuclei[i].size)); });
    candidates_ = components_.size();
    return first;
  }

  // Generation after generation, until all are too small.
  void take_satellites() {
    for (std::size_t first = 0; first < components_.size() && !stopped_;) {
      first = take(gathered(components_.size() - first, [&](std::size_t i) {
        return approx_satellites(components_[first + i], least_size(), options_.max_period);
      }));
    }
  }

  // The largest first, so that what is at hand is worth most when the caller has had enough.
  std::vector<CatalogueEntry> proved() {
    std::vector<std::size_t> order(components_.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
      return components_[a].nucleus.size > components_[b].nucleus.size;
    });
    std::vector<std::optional<CatalogueEntry>> entries(order.size());
    for_each(order.size(), [&](std::size_t i) {
      entries[i] = prove_component(components_[order[i]], rest(components_[order[i]]));
      ++proved_;
    });
    std::vector<CatalogueEntry> kept;
    for (auto& entry : entries)
      if (entry) kept.push_back(std::move(*entry));
    std::sort(kept.begin(), kept.end(), [](const CatalogueEntry& a, const CatalogueEntry& b) {
      return std::pair(a.component.re, a.component.im) < std::pair(b.component.re, b.component.im);
    });
    return kept;
  }

  double least_size() const { return std::ldexp(1.0, -*options_.resolution); }

  // Coefficients that are computed: those of small components hardly matter.
  std::size_t terms(double size) const {
    constexpr double kSmall = 16;
    constexpr std::size_t kFew = 4;
    return options_.resolution && size < kSmall * least_size() ? kFew : ApproxComponent::kMost;
  }

  double rest(const ApproxComponent& component) const {
    constexpr double kShare = 1e-9;  // of the area, where no resolution is asked for
    if (!options_.resolution) return kShare * component.approx_area();
    return options_.left_out * least_size() * least_size();
  }

  const CatalogueOptions& options_;
  const std::function<bool(const CatalogueProgress&)>& go_on_;
  std::vector<ApproxNucleus> known_;  // in canonical order
  std::vector<ApproxComponent> components_;
  std::size_t rows_ = 0;
  std::atomic<std::size_t> scanned_ = 0, candidates_ = 0, proved_ = 0;
  std::atomic<bool> stopped_ = false;
};

}  // namespace

std::vector<CatalogueEntry> catalogue(const CatalogueOptions& options,
                                      const std::function<bool(const CatalogueProgress&)>& go_on) {
  return Catalogue(options, go_on).run();
}

bool is_complete_at(std::uint32_t period, const std::vector<CatalogueEntry>& entries) {
  std::uint64_t count = 0;
  for (const CatalogueEntry& entry : entries)
    if (entry.component.period == period) count += entry.component.is_real() ? 1 : 2;
  return count == number_of_nuclei(period);
}

}  // namespace merestone
