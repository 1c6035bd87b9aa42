// From black-box values modulo a prime to coefficient vectors, level by level (see the header).
// Invariant: at every level the vector's unit entry is 1, so equal points give equal vectors.
#include "search/reconstruction.hpp"

#include <algorithm>

#include "search/interpolation.hpp"

namespace sumwright::search {
namespace {

constexpr std::size_t kMaxPoints = 4000;
constexpr std::size_t kMaxWords = 20000000;  // of samples kept at one level

void trim(WordVector& a) {
  while (!a.empty() && a.back() == 0) a.pop_back();
}

}  // namespace

ModularReconstruction::ModularReconstruction(std::size_t ring_size,
                                             std::vector<std::size_t> variables,
                                             std::size_t entries, std::size_t first_group,
                                             std::size_t unit, unsigned long seed)
    : levels_(variables.size()), ring_size_(ring_size), random_(seed) {
  for (std::size_t i = 0; i < entries; ++i) {
    layout_.push_back({i, std::vector<unsigned long>(ring_size, 0)});
  }
  for (std::size_t l = 0; l < levels_.size(); ++l) {
    levels_[l].variable = variables[l];
    levels_[l].start = random_() >> 6;
  }
  start_level(0, entries, first_group, unit);
}

void ModularReconstruction::start_level(std::size_t index, std::size_t entries,
                                        std::size_t first_group, std::size_t unit) {
  if (index == levels_.size()) return;
  Level& level = levels_[index];
  level.entries = entries;
  level.first_group = first_group;
  level.unit = unit;
  for (std::size_t i = 0; i < entries; ++i) level.weights.push_back(random_() >> 5);
}

std::optional<WordVector> ModularReconstruction::image(const Field& field, const BlackBox& box,
                                                       const algebra::Deadline& deadline) {
  field_ = &field;
  box_ = &box;
  deadline_ = &deadline;
  for (Level& level : levels_) {
    level.at.clear();
    for (Word& weight : level.weights) weight = field.reduce(weight);
  }
  WordVector point(ring_size_, 0);
  return run(levels_.size(), point);
}

std::optional<WordVector> ModularReconstruction::run(std::size_t level, WordVector& point) {
  if (level == 0) return (*box_)(point);
  const std::size_t index = level - 1;
  Samples samples;
  while (true) {
    Level& here = levels_[index];
    if (!sample(level, point, here.points, samples)) return std::nullopt;
    set_points(here, samples.at);
    WordVector at_samples;
    const auto below = denominator(here, samples, at_samples);
    if (below) {
      auto out = numerators(index, samples, *below, at_samples);
      if (out || levels_[index].known) return out;
    } else if (here.known) {
      return std::nullopt;
    }
    here.points += std::max<std::size_t>(3, here.points / 3);
    if (here.points > kMaxPoints || here.points * here.entries > kMaxWords) {
      throw algebra::TimeUp("size limit reached: degrees of the recurrence");
    }
  }
}

// Extends the samples to `count`; points where the level below has no value are left out.
bool ModularReconstruction::sample(std::size_t level, WordVector& point, std::size_t count,
                                   Samples& into) {
  Level& here = levels_[level - 1];
  std::size_t failures = 0;
  Word next = into.at.empty() ? field_->reduce(here.start) : field_->add(into.at.back(), 1);
  while (into.at.size() < count) {
    deadline_->check();
    point[here.variable] = next;
    auto vector = run(level - 1, point);
    if (vector && vector->size() == here.entries) {
      into.vectors.push_back(std::move(*vector));
      into.at.push_back(next);
    } else if (++failures > 10 + count) {
      return false;
    }
    next = field_->add(next, 1);
  }
  return true;
}

void ModularReconstruction::set_points(Level& level, const WordVector& at) {
  if (level.at == at) return;
  level.at = at;
  level.master = master_polynomial(*field_, at);
  level.matrix = interpolation_matrix(*field_, at);
}

// The common denominator (monic) and its values at the samples: first that of the unit's group,
// then what the other entries need beyond it.
std::optional<WordVector> ModularReconstruction::denominator(Level& level, const Samples& samples,
                                                             WordVector& at_samples) {
  const std::size_t count = samples.at.size();
  at_samples.assign(count, 1);
  WordVector total = {1};
  for (int group = 0; group < 2; ++group) {
    const std::size_t from = group == 0 ? 0 : level.first_group;
    const std::size_t size = (group == 0 ? level.first_group : level.entries) - from;
    if (size == 0) continue;
    WordVector values(count);
    for (std::size_t j = 0; j < count; ++j) {
      const Word sum =
          field_->dot(level.weights.data() + from, samples.vectors[j].data() + from, size);
      values[j] = field_->mul(sum, at_samples[j]);
    }
    WordVector interpolant(count);
    for (std::size_t i = 0; i < count; ++i) {
      interpolant[i] = field_->dot(level.matrix[i].data(), values.data(), count);
    }
    const auto fraction = recover_fraction(*field_, level.master, std::move(interpolant));
    if (!fraction) return std::nullopt;
    if (group == 1) level.extra_degree = fraction->denominator.size() - 1;
    if (fraction->denominator.size() == 1) continue;
    total = multiply(*field_, total, fraction->denominator);
    for (std::size_t j = 0; j < count; ++j) {
      at_samples[j] =
          field_->mul(at_samples[j], evaluate(*field_, fraction->denominator, samples.at[j]));
    }
  }
  return total;
}

std::optional<WordVector> ModularReconstruction::numerators(std::size_t index,
                                                            const Samples& samples,
                                                            const WordVector& denominator,
                                                            const WordVector& at_samples) {
  Level& level = levels_[index];
  const std::size_t count = samples.at.size();
  if (level.known && denominator.size() != level.sizes[level.unit]) return std::nullopt;
  std::vector<WordVector> polynomials;
  WordVector out;
  if (level.known) out.reserve(level.out_entries);
  WordVector values(count);
  for (std::size_t e = 0; e < level.entries; ++e) {
    if (e % 16 == 15) deadline_->check();
    for (std::size_t j = 0; j < count; ++j) {
      values[j] = field_->mul(samples.vectors[j][e], at_samples[j]);
    }
    if (level.known) {
      for (std::size_t i = 0; i < level.sizes[e]; ++i) {
        out.push_back(field_->dot(level.matrix[i].data(), values.data(), count));
      }
      continue;
    }
    WordVector polynomial(count);
    for (std::size_t i = 0; i < count; ++i) {
      polynomial[i] = field_->dot(level.matrix[i].data(), values.data(), count);
    }
    trim(polynomial);
    if (polynomial.size() == count) return std::nullopt;  // not enough points
    polynomials.push_back(std::move(polynomial));
  }
  if (level.known) return out;
  learn(index, polynomials, denominator.size());
  for (const WordVector& polynomial : polynomials) {
    out.insert(out.end(), polynomial.begin(), polynomial.end());
  }
  return out;
}

// Fixes the degrees, the least number of points with one to spare, and the next level's vector.
void ModularReconstruction::learn(std::size_t index, const std::vector<WordVector>& polynomials,
                                  std::size_t denominator_size) {
  Level& level = levels_[index];
  level.known = true;
  std::size_t first_group = 0;
  std::size_t unit = 0;
  std::size_t largest_first = 1;
  std::size_t largest = 1;
  std::vector<Coefficient> layout;
  for (std::size_t e = 0; e < polynomials.size(); ++e) {
    const std::size_t size = polynomials[e].size();
    level.sizes.push_back(size);
    if (e == level.unit) unit = layout.size() + size - 1;
    for (std::size_t i = 0; i < size; ++i) {
      layout.push_back(layout_[e]);
      layout.back().exponents[level.variable] = i;
    }
    if (e < level.first_group) {
      first_group = layout.size();
      largest_first = std::max(largest_first, size);
    }
    largest = std::max(largest, size);
  }
  layout_ = std::move(layout);
  level.out_entries = layout_.size();
  level.points = std::max(largest_first + denominator_size, largest + level.extra_degree + 1);
  start_level(index + 1, layout_.size(), first_group, unit);
}

}  // namespace sumwright::search
