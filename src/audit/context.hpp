// What every check of one audit shares: the Proof, the samples, the points, and a way to report.
#pragma once

#include <functional>
#include <string>
#include <vector>

#include "audit/audit.hpp"
#include "audit/author.hpp"
#include "audit/numbers.hpp"
#include "proof/proof.hpp"

namespace sumwright::audit {

/// A parameter sample with the running variable (and index) set.
struct Place {
  std::size_t sample = 0;
  long n = 0;
  long k = 0;
};

/// Collects the cases of one check into a Finding; only the first disagreement is kept.
class Check {
 public:
  explicit Check(std::string name) { finding_.check = std::move(name); }

  void count(std::size_t cases = 1) { finding_.cases += cases; }
  void fail(const std::string& detail);
  /// Adds a remark that is shown when nothing disagrees ("expanded").
  void remark(const std::string& text);
  /// Counts one case; `detail` is called only when it fails.
  void expect(bool fine, const std::function<std::string()>& detail);
  /// left = right as existing numbers.
  void expect_same(const Value& left, const Value& right, const std::string& what, const Point& at);
  /// Runs one case; values beyond the limits leave it out, and the number of those is remarked.
  void attempt(const std::function<void()>& one_case);
  [[nodiscard]] bool agrees() const { return finding_.agrees; }
  [[nodiscard]] Finding finding() const;

 private:
  Finding finding_;
  std::size_t left_out_ = 0;
  std::string first_reason_;
};

/// Everything a check needs. Samples and points are made once.
class Context {
 public:
  Context(const proof::Proof& proof, const AuditOptions& options);

  const proof::Proof& proof;
  const claim::Claim& claim;
  const AuditOptions& options;
  std::vector<std::string> names;  ///< of Proof::symbols
  std::vector<Point> samples;
  Author author;

  void tick() const {
    if (options.check_time) options.check_time();
  }
  /// Every hypothesis of the claim holds at this sample and n.
  [[nodiscard]] bool admits(std::size_t sample, long n) const;
  [[nodiscard]] Point at(const Place& place) const {
    return author.point(place.sample, place.n, place.k);
  }

  /// The n at which ends of the range meet, for this sample.
  [[nodiscard]] const std::vector<long>& crossings(std::size_t sample) const {
    return crossings_.at(sample);
  }

  /// n >= threshold: the first few, some later ones, those where ends of the range meet, and those
  /// where a coefficient or weight vanishes.
  [[nodiscard]] const std::vector<Place>& running_places() const { return running_places_; }
  /// The same with low <= k <= high of the telescoping range: all, or both ends and some between.
  [[nodiscard]] const std::vector<Place>& index_places() const { return index_places_; }

 private:
  void add_sample(const Point& point);
  void add_special_samples();
  [[nodiscard]] std::vector<long> chosen_values(std::size_t sample) const;
  void make_places();

  std::vector<std::vector<long>> crossings_;
  std::vector<Place> running_places_;
  std::vector<Place> index_places_;
};

/// Some of low..high: all when there are at most `all`, else both ends and some between.
[[nodiscard]] std::vector<long> spread(long low, long high, long all = 12);

}  // namespace sumwright::audit
