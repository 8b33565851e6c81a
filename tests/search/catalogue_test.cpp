// Lemma A2: the catalogue of hyperbolic components. Counts by period from OEIS A000740 (verified) and A000048 (terms
// verified, reading memory); satellites by Euler's function (published-values, Components); areas from published-values
// (computed) and its bounds of the area of M.

#include <tbb/global_control.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <mutex>
#include <numeric>

#include "catch.hpp"
#include "kernel/component_list.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"
#include "reference/published.hpp"
#include "search/catalogue/all_nuclei.hpp"
#include "search/catalogue/catalogue.hpp"

using merestone::CatalogueEntry;
using merestone::CatalogueOptions;
using merestone::Component;
using reference::decimal;
using reference::exact;

namespace {

const std::vector<std::uint64_t> kNuclei = {1, 1, 3, 6, 15, 27, 63, 120, 252, 495, 1023, 2010};  // OEIS A000740
const std::vector<std::uint64_t> kReal = {1, 1, 1, 2, 3, 5, 9, 16, 28, 51, 93, 170};             // OEIS A000048

std::vector<CatalogueEntry> catalogue_of(std::optional<int> resolution, std::uint32_t complete_to) {
  CatalogueOptions options;
  options.resolution = resolution;
  options.complete_to = complete_to;
  return merestone::catalogue(options, [](const merestone::CatalogueProgress&) { return true; });
}

std::vector<Component> components_of(const std::vector<CatalogueEntry>& entries) {
  std::vector<Component> components;
  for (const CatalogueEntry& entry : entries) components.push_back(entry.component);
  return components;
}

mpq_class total_area(const std::vector<CatalogueEntry>& entries) {
  merestone::Dyadic sum;
  for (const CatalogueEntry& entry : entries) sum = sum + counted_area(entry.component, entry.proved.lower);
  return exact(sum);
}

std::uint64_t multiplicity(const CatalogueEntry& entry) { return entry.component.is_real() ? 1 : 2; }

std::uint64_t totient(std::uint64_t n) {
  std::uint64_t count = 0;
  for (std::uint64_t k = 1; k <= n; ++k) count += std::gcd(k, n) == 1;
  return count;
}

// Every component of period d has totient(n/d) satellites of period n.
std::uint64_t number_of_satellites(std::size_t period) {
  std::uint64_t count = 0;
  for (std::size_t d = 1; d < period; ++d)
    if (period % d == 0) count += totient(period / d) * kNuclei[d - 1];
  return count;
}

}  // namespace

TEST_CASE("all nuclei of each period are found, and established") {
  const std::size_t most = reference::repeats(1) > 1 ? 12 : 8;
  const auto entries = catalogue_of(std::nullopt, static_cast<std::uint32_t>(most));
  CHECK_FALSE(check_distinct(components_of(entries)));
  std::map<std::uint32_t, std::uint64_t> all, real, satellites;
  for (const CatalogueEntry& entry : entries) {
    all[entry.component.period] += multiplicity(entry);
    real[entry.component.period] += entry.component.is_real() ? 1 : 0;
    satellites[entry.component.period] += entry.appears_satellite ? multiplicity(entry) : 0;
  }
  CHECK(all.size() == most);
  for (std::uint32_t period = 1; period <= most; ++period) {
    INFO("period " << period);
    CHECK(all[period] == kNuclei[period - 1]);
    CHECK(real[period] == kReal[period - 1]);
    CHECK(satellites[period] == number_of_satellites(period));
    CHECK(is_complete_at(period, entries));
  }
  CHECK_FALSE(is_complete_at(static_cast<std::uint32_t>(most) + 1, entries));
}

TEST_CASE("the number of nuclei of a period") {
  for (std::size_t n = 1; n <= kNuclei.size(); ++n)
    CHECK(merestone::number_of_nuclei(static_cast<std::uint32_t>(n)) == kNuclei[n - 1]);
}

TEST_CASE("a catalogue with one entry missing is not complete") {
  auto entries = catalogue_of(std::nullopt, 5);
  const auto is_of_period_5 = [](const CatalogueEntry& entry) { return entry.component.period == 5; };
  entries.erase(std::find_if(entries.begin(), entries.end(), is_of_period_5));
  CHECK_FALSE(is_complete_at(5, entries));
  CHECK(is_complete_at(4, entries));
}

TEST_CASE("published nuclei are there, and the areas up to period 4 add to the published sum") {
  const auto entries = catalogue_of(std::nullopt, 4);
  for (const reference::PublishedPoint& point : reference::nuclei()) {
    const auto is_it = [&](const CatalogueEntry& entry) {
      const reference::Complex c{decimal(point.re), decimal(point.im)};
      return entry.component.period == point.period &&
             norm(reference::midpoint(entry.proved.nucleus) - c) < reference::power_of_two(-100);
    };
    CHECK(std::count_if(entries.begin(), entries.end(), is_it) == 1);
  }
  const mpq_class sum = decimal("1.45426434176951674");  // published-values, status computed
  CHECK(total_area(entries) <= sum);
  CHECK(total_area(entries) > sum - decimal("0.000000001"));
}

TEST_CASE("a resolution finds components in order of size, and finer ones find more area") {
  mpq_class before = decimal("1.45426434");  // of periods up to 4 (computed)
  std::size_t count = 0;
  for (const int resolution : {9, 10, 11}) {
    const auto entries = catalogue_of(resolution, 0);
    CHECK_FALSE(check_distinct(components_of(entries)));
    CHECK(entries.size() > 3 * count / 2);
    count = entries.size();
    const mpq_class area = total_area(entries);
    CHECK(area > before);
    CHECK(area <
          decimal("1.5065918849") + decimal("0.0000000028"));  // statistical estimate (Förstemann 2012, verified)
    before = area;
  }
}

TEST_CASE("what a resolution finds has every component of short period and that size") {
  const auto all = catalogue_of(std::nullopt, 8);
  const auto found = components_of(catalogue_of(11, 0));
  std::size_t expected = 0;
  for (const CatalogueEntry& entry : all) {
    if (!(entry.proved.conformal_radius_lower > merestone::Dyadic(0x1p-11))) continue;
    ++expected;
    const auto is_it = [&](const Component& component) {
      return component.period == entry.component.period && std::abs(component.re - entry.component.re) < 0x1p-40 &&
             std::abs(component.im - entry.component.im) < 0x1p-40;
    };
    INFO("period " << entry.component.period << " at " << entry.component.re << " + " << entry.component.im << " i");
    CHECK(std::count_if(found.begin(), found.end(), is_it) == 1);
  }
  CHECK(expected > 40);
}

TEST_CASE("the catalogue does not depend on the number of threads") {
  std::vector<std::vector<Component>> lists;
  for (const std::size_t threads : {1, 2, 4}) {
    const tbb::global_control control(tbb::global_control::max_allowed_parallelism, threads);
    lists.push_back(components_of(catalogue_of(10, 7)));
  }
  CHECK(lists[0].size() > 300);
  CHECK(lists[1] == lists[0]);
  CHECK(lists[2] == lists[0]);
}

TEST_CASE("a catalogue that is stopped has what was proved until then, in order and distinct") {
  CatalogueOptions options;
  options.complete_to = 9;
  std::mutex mutex;
  const auto entries = merestone::catalogue(options, [&](const merestone::CatalogueProgress& at) {
    const std::lock_guard lock(mutex);
    return at.proved < 50;
  });
  CHECK(entries.size() >= 50);
  CHECK(entries.size() < 100);
  CHECK_FALSE(check_distinct(components_of(entries)));
}
