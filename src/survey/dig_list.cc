#include "survey/dig_list.h"

#include <algorithm>
#include <bit>
#include <functional>
#include <queue>
#include <utility>

namespace nearpit {
namespace {

using Bits = std::vector<std::uint64_t>;

void set_bit(Bits& bits, NodeId id, bool on) {
  const auto at = static_cast<std::size_t>(id);
  const std::uint64_t mask = std::uint64_t{1} << (at % 64);
  bits[at / 64] = on ? bits[at / 64] | mask : bits[at / 64] & ~mask;
}

bool get_bit(const Bits& bits, NodeId id) {
  const auto at = static_cast<std::size_t>(id);
  return (bits[at / 64] >> (at % 64) & 1) != 0;
}

template <class Visit>
void each_bit(const Bits& bits, Visit visit) {
  for (std::size_t word = 0; word < bits.size(); ++word) {
    for (std::uint64_t left = bits[word]; left != 0; left &= left - 1) {
      visit(static_cast<NodeId>(word * 64 + static_cast<std::size_t>(std::countr_zero(left))));
    }
  }
}

std::vector<NodeId> listed(const Bits& bits) {
  std::vector<NodeId> ids;
  each_bit(bits, [&](NodeId id) { ids.push_back(id); });
  return ids;
}

}  // namespace

DigList::DigList(const SurveyGround& ground) : ground_(&ground) {
  const auto size = static_cast<std::size_t>(ground.frame.size());
  state_.assign(size, PitState::kNoRecord);
  ring_.assign(size, kNotReached);
  closed_ground_.assign(size, 0);
  closed_access_.assign(size, 0);
  halts_.assign(size, 0);
  due_bits_.assign(size / 64 + 1, 0);
  halted_bits_.assign(size / 64 + 1, 0);
  positive_bits_.assign(size / 64 + 1, 0);
  for (NodeId id = 0; id < ground.frame.size(); ++id) {
    if (!ground.sample.holds[index(id)]) continue;
    ring_[index(id)] = 0;
    set_bit(due_bits_, id, true);
  }
}

void DigList::refresh(NodeId id) {
  const bool wanted = in_design(id) && state(id) == PitState::kNoRecord && !closed(id);
  set_bit(due_bits_, id, wanted && halts_[index(id)] == 0);
  set_bit(halted_bits_, id, wanted && halts_[index(id)] > 0);
}

void DigList::set_state(NodeId id, PitState state, std::vector<NodeId>* changed) {
  const PitState before = state_[index(id)];
  if (before == state) return;
  state_[index(id)] = state;
  set_bit(positive_bits_, id, state == PitState::kPositive);
  changed->push_back(id);
  refresh(id);
  if (!in_design(id)) return;
  if (state == PitState::kPositive) relax_from({id}, changed);
  if (before == PitState::kPositive) drop_support(id, changed);
}

void DigList::add_closed(NodeId id, ReasonClass reason, int change, std::vector<NodeId>* changed) {
  auto& count = (reason == ReasonClass::kGround ? closed_ground_ : closed_access_)[index(id)];
  count = static_cast<std::uint16_t>(count + change);
  changed->push_back(id);
  refresh(id);
}

void DigList::add_halt(NodeId id, int change, std::vector<NodeId>* changed) {
  halts_[index(id)] = static_cast<std::uint16_t>(halts_[index(id)] + change);
  changed->push_back(id);
  refresh(id);
}

// The ring that the present supporters give, kNotReached when none does.
std::int32_t DigList::best_ring(NodeId id) const {
  if (ground_->sample.holds[index(id)]) return 0;
  std::int32_t best = kNotReached;
  ground_->each_opened(id, [&](NodeId other) {
    if (supports(other) && (best == kNotReached || ring(other) + 1 < best)) best = ring(other) + 1;
  });
  return ground_->ring_limit && best > *ground_->ring_limit ? kNotReached : best;
}

// Sources are design positives whose ring is right; spreads smaller rings outwards, nearest ring first.
void DigList::relax_from(std::vector<NodeId> sources, std::vector<NodeId>* changed) {
  using Entry = std::pair<std::int32_t, NodeId>;
  std::priority_queue<Entry, std::vector<Entry>, std::greater<>> open;
  for (const NodeId source : sources)
    open.emplace(ring(source), source);
  while (!open.empty()) {
    const auto [from_ring, from] = open.top();
    open.pop();
    if (from_ring != ring(from)) continue;
    const std::int32_t offered = from_ring + 1;
    if (ground_->ring_limit && offered > *ground_->ring_limit) continue;
    ground_->each_opened(from, [&](NodeId other) {
      if (in_design(other) && ring(other) <= offered) return;
      ring_[index(other)] = offered;
      changed->push_back(other);
      refresh(other);
      if (state(other) == PitState::kPositive) open.emplace(offered, other);
    });
  }
}

// `id` no longer supports its neighbours. Those that leaned on it alone fall out, in order of ring; then each takes its best remaining support.
void DigList::drop_support(NodeId id, std::vector<NodeId>* changed) {
  using Entry = std::pair<std::int32_t, NodeId>;
  std::queue<Entry> leaning;
  const auto lean_on = [&](NodeId from, std::int32_t from_ring) {
    ground_->each_opened(from, [&](NodeId other) {
      if (in_design(other) && ring(other) == from_ring + 1) leaning.emplace(from_ring + 1, other);
    });
  };
  lean_on(id, ring(id));
  std::vector<NodeId> fallen;
  while (!leaning.empty()) {
    const auto [old_ring, at] = leaning.front();
    leaning.pop();
    if (!in_design(at) || ring(at) != old_ring || best_ring(at) == old_ring) continue;
    ring_[index(at)] = kNotReached;
    fallen.push_back(at);
    changed->push_back(at);
    refresh(at);
    if (state(at) == PitState::kPositive) lean_on(at, old_ring);
  }
  std::vector<NodeId> sources;
  for (const NodeId at : fallen) {
    ground_->each_opened(at, [&](NodeId other) {
      if (supports(other)) sources.push_back(other);
    });
  }
  relax_from(std::move(sources), changed);
}

bool DigList::halted(NodeId id) const { return get_bit(halted_bits_, id); }
bool DigList::due(NodeId id) const { return get_bit(due_bits_, id); }

bool DigList::not_dug(NodeId id, ReasonClass reason) const {
  if (!in_design(id)) return false;
  const bool access = reason == ReasonClass::kAccess;
  if (state(id) == PitState::kNotDugAccess) return access;
  if (state(id) == PitState::kNotDugGround) return !access;
  if (state(id) != PitState::kNoRecord || !closed(id)) return false;
  return access == (closed_access_[index(id)] > 0);
}

std::vector<NodeId> DigList::due() const { return listed(due_bits_); }
std::vector<NodeId> DigList::halted() const { return listed(halted_bits_); }

std::vector<NodeId> DigList::opened_by(NodeId id) const {
  std::vector<NodeId> openers;
  ground_->each_opened(id, [&](NodeId other) {
    if (supports(other)) openers.push_back(other);
  });
  std::sort(openers.begin(), openers.end());
  return openers;
}

std::vector<NodeId> DigList::design_positives() const {
  std::vector<NodeId> ids;
  each_bit(positive_bits_, [&](NodeId id) {
    if (in_design(id)) ids.push_back(id);
  });
  return ids;
}

bool DigList::truncated() const {
  if (!ground_->ring_limit) return false;
  bool kept_off = false;
  for (const NodeId id : design_positives()) {
    ground_->each_opened(id, [&](NodeId other) { kept_off = kept_off || !in_design(other); });
  }
  return kept_off;
}

}  // namespace nearpit
