#include "kernel/sane.hpp"

#include <algorithm>

#include "kernel/overloaded.hpp"
#include "kernel/work.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kLargestPeriod = std::uint64_t{1} << 53;  // figures hold it exactly

bool is_proper(const ComplexDyadic& z) { return z.re.is_moderate() && z.im.is_moderate(); }

bool is_proper(const Disc& disc) { return is_proper(disc.centre) && disc.radius.is_moderate() && disc.radius.sign() > 0; }

bool is_period(std::uint64_t period) { return period >= 1 && period <= kLargestPeriod; }

bool is_sane(const Statement& statement) {
  return std::visit(Overloaded{[](const Count& count) {
                                 return count.index >= 1 && count.bailout.is_moderate() &&
                                        count.bailout >= Dyadic(2.0) && count.bailout <= Dyadic(0x1p60);
                               },
                               [](const Nucleus& type) { return is_period(type.period); },
                               [](const Misiurewicz& type) {
                                 return is_period(type.period) && type.preperiod >= 2 && type.preperiod <= kLargestPeriod;
                               },
                               [](const auto&) { return true; }},
                    statement);
}

struct RuleIsSane {
  const Statement& statement;
  int depth;

  bool operator()(const Escape& by) const {
    return by.bits >= 2 && (std::holds_alternative<Count>(statement) ? by.index == 0 : by.index >= 1);
  }
  bool operator()(const AttractingDisc& by) const {
    return by.bits >= 2 && is_period(by.period) && is_proper(by.disc);
  }
  bool operator()(const ClosedForm& by) const { return by.period == 1 || by.period == 2; }
  bool operator()(const RealSegment&) const { return true; }
  bool operator()(const Preperiodic& by) const { return by.period >= 1; }
  bool operator()(const ExteriorDisc& by) const { return by.bits >= 2 && by.index >= 1 && is_proper(by.centre); }
  bool operator()(const InteriorDisc& by) const { return is_proper(by.centre) && (*this)(by.cycle); }
  bool operator()(const IsolatedRoot& by) const { return by.bits >= 2; }
  bool operator()(const Witnesses& by) const {
    return depth == 0 && !by.claims.empty() && by.claims.size() <= 2 &&
           std::all_of(by.claims.begin(), by.claims.end(), [](const Claim& claim) {
             return merestone::is_proper(claim.region) && !claim.request && is_sane(claim.statement) &&
                    std::visit(RuleIsSane{claim.statement, 1}, claim.by);
           });
  }
  bool operator()(const Quarters& by) const {
    return depth < kDeepestRule && by.rules.size() == 4 &&
           std::all_of(by.rules.begin(), by.rules.end(),
                       [this](const Rule& rule) { return std::visit(RuleIsSane{statement, depth + 1}, rule); });
  }
};

}  // namespace

bool is_proper(const Region& region) {
  return std::visit(Overloaded{[](const Point&) { return true; },
                               [](const Segment& segment) {
                                 return segment.lo.is_moderate() && segment.hi.is_moderate() && segment.lo < segment.hi;
                               },
                               [](const Disc& disc) { return is_proper(disc); },
                               [](const Box& box) {
                                 return is_proper(box.lo) && is_proper(box.hi) && box.lo.re < box.hi.re &&
                                        box.lo.im < box.hi.im;
                               }},
                    region);
}

bool hints_are_sane(const Claim& claim) {
  return is_sane(claim.statement) && std::visit(RuleIsSane{claim.statement, 0}, claim.by);
}

}  // namespace merestone
