#include "support/exact_oracle.h"

#include <algorithm>
#include <iterator>
#include <set>
#include <utility>

namespace nearpit::exact {

Rational binomial(std::size_t of, std::size_t taken) {
  if (taken > of) return 0;
  Rational value = 1;
  for (std::size_t i = 0; i < taken; ++i)
    value = value * (of - i) / (i + 1);
  return value;
}

bool lone_unit(const Population& population, const Sample& sample) {
  for (std::size_t h = 0; h < sample.size(); ++h) {
    if (sample[h].size() == 1 && population.units[h].size() > 1) return true;
  }
  return false;
}

void OverSamples::add(const Rational& value) {
  sum_ += value;
  squares_ += value * value;
  count_ += 1;
}

Oracle::Oracle(Population population) : population_(std::move(population)), network_of_(nodes(), nodes()) {
  for (std::size_t start = 0; start < nodes(); ++start) {
    if (network_of_[start] != nodes()) continue;
    Nodes network{start};
    network_of_[start] = networks_.size();
    for (std::size_t next = 0; next < network.size() && population_.positive[start]; ++next) {
      for (const std::size_t other : population_.neighbours[network[next]]) {
        if (!population_.positive[other] || network_of_[other] != nodes()) continue;
        network_of_[other] = networks_.size();
        network.push_back(other);
      }
    }
    networks_.push_back(network);
  }
  for (const Nodes& network : networks_)
    met_by_.push_back(units_met(network));
}

Oracle::Met Oracle::units_met(const Nodes& network) const {
  Met met(population_.units.size());
  for (std::size_t h = 0; h < met.size(); ++h) {
    for (std::size_t i = 0; i < population_.units[h].size(); ++i) {
      const Nodes& unit = population_.units[h][i];
      const bool meets = std::any_of(unit.begin(), unit.end(), [&](std::size_t node) {
        return std::find(network.begin(), network.end(), node) != network.end();
      });
      if (meets) met[h].push_back(i);
    }
  }
  return met;
}

Nodes Oracle::met_networks(const Sample& sample) const {
  std::set<std::size_t> met;
  for (std::size_t h = 0; h < sample.size(); ++h) {
    for (const std::size_t i : sample[h]) {
      for (const std::size_t node : population_.units[h][i])
        met.insert(network_of_[node]);
    }
  }
  return {met.begin(), met.end()};
}

// prod_h C(N_h - x_h, n_h) / C(N_h, n_h)
Rational Oracle::missed(const Sample& sample, const Met& met) const {
  Rational chance = 1;
  for (std::size_t h = 0; h < sample.size(); ++h) {
    const std::size_t all = population_.units[h].size();
    chance *= binomial(all - met[h].size(), sample[h].size()) / binomial(all, sample[h].size());
  }
  return chance;
}

Figure Oracle::expand(const Sample& sample,
                      const std::function<Rational(std::size_t, std::size_t)>& value_of_unit) const {
  Figure figure{0, Rational(0)};
  for (std::size_t h = 0; h < sample.size(); ++h) {
    const Rational all = population_.units[h].size();
    const Rational drawn = sample[h].size();
    const Rational weight = all / nodes();
    Rational sum = 0;
    Rational squares = 0;
    for (const std::size_t i : sample[h]) {
      const Rational value = value_of_unit(h, i);
      sum += value;
      squares += value * value;
    }
    figure.mean += weight * sum / drawn;
    if (drawn == all || drawn == 1) continue;
    const Rational s2 = (squares - sum * sum / drawn) / (drawn - 1);
    *figure.variance += weight * weight * (1 - drawn / all) * s2 / drawn;
  }
  if (lone_unit(population_, sample)) figure.variance.reset();
  return figure;
}

Figure Oracle::first_sample(const Sample& sample, const Values& y) const {
  return expand(sample, [&](std::size_t h, std::size_t i) {
    Rational sum = 0;
    for (const std::size_t node : population_.units[h][i])
      sum += y[node];
    return sum;
  });
}

Figure Oracle::hansen_hurwitz(const Sample& sample, const Values& y) const {
  return expand(sample, [&](std::size_t h, std::size_t i) {
    std::set<std::size_t> met;
    for (const std::size_t node : population_.units[h][i])
      met.insert(network_of_[node]);
    Rational sum = 0;
    for (const std::size_t k : met) {
      std::size_t units = 0;
      for (const Nodes& in_stratum : met_by_[k])
        units += in_stratum.size();
      for (const std::size_t node : networks_[k])
        sum += y[node] / units;
    }
    return sum;
  });
}

Figure Oracle::horvitz_thompson(const Sample& sample, const Values& y) const {
  const Nodes met = met_networks(sample);
  Values total(met.size());
  Values q(met.size());
  for (std::size_t j = 0; j < met.size(); ++j) {
    for (const std::size_t node : networks_[met[j]])
      total[j] += y[node];
    q[j] = missed(sample, met_by_[met[j]]);
  }
  Figure figure{0, std::nullopt};
  for (std::size_t j = 0; j < met.size(); ++j)
    figure.mean += total[j] / (1 - q[j]) / nodes();
  if (lone_unit(population_, sample)) return figure;
  Rational sum = 0;
  for (std::size_t j = 0; j < met.size(); ++j) {
    for (std::size_t k = 0; k < met.size(); ++k) {
      if (total[j] == 0 || total[k] == 0) continue;
      Met either(sample.size());
      for (std::size_t h = 0; h < sample.size(); ++h) {
        std::set_union(met_by_[met[j]][h].begin(), met_by_[met[j]][h].end(), met_by_[met[k]][h].begin(),
                       met_by_[met[k]][h].end(), std::back_inserter(either[h]));
      }
      const Rational alpha_j = 1 - q[j];
      const Rational alpha_k = 1 - q[k];
      const Rational alpha_jk = j == k ? alpha_j : 1 - q[j] - q[k] + missed(sample, either);
      sum += total[j] * total[k] / alpha_jk * (alpha_jk / (alpha_j * alpha_k) - 1);
    }
  }
  figure.variance = sum / nodes() / nodes();
  return figure;
}

namespace {

// Every choice of `count` of 0 .. total-1.
std::vector<Nodes> choices(std::size_t total, std::size_t count) {
  std::vector<Nodes> all;
  std::vector<bool> taken(total, false);
  std::fill(taken.begin(), taken.begin() + static_cast<std::ptrdiff_t>(count), true);
  do {
    Nodes choice;
    for (std::size_t i = 0; i < total; ++i) {
      if (taken[i]) choice.push_back(i);
    }
    all.push_back(choice);
  } while (std::prev_permutation(taken.begin(), taken.end()));
  return all;
}

void each_rest(const std::vector<std::vector<Nodes>>& by_stratum, Sample* sample,
               const std::function<void(const Sample&)>& visit) {
  if (sample->size() == by_stratum.size()) {
    visit(*sample);
    return;
  }
  for (const Nodes& choice : by_stratum[sample->size()]) {
    sample->push_back(choice);
    each_rest(by_stratum, sample, visit);
    sample->pop_back();
  }
}

}  // namespace

void Oracle::each_sample(const std::vector<std::size_t>& count, const std::function<void(const Sample&)>& visit) const {
  std::vector<std::vector<Nodes>> by_stratum;
  for (std::size_t h = 0; h < count.size(); ++h)
    by_stratum.push_back(choices(population_.units[h].size(), count[h]));
  Sample sample;
  each_rest(by_stratum, &sample, visit);
}

}  // namespace nearpit::exact
