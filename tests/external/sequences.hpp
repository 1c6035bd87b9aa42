// Published sequences, and a second way to the same numbers.
#pragma once

#include <gmpxx.h>

#include <functional>
#include <ostream>
#include <string>
#include <vector>

#include "external/balls.hpp"

namespace sumwright::testing {

struct Sequence {
  std::string number;  ///< in the OEIS
  std::string title;
  std::vector<mpz_class> terms;  ///< from memory, checked against `route`
  std::string how;               ///< what `route` does
  /// The first `count` terms without any list, claim file or recurrence in n of the program.
  std::function<std::vector<mpz_class>(std::size_t count)> route;
};

/// S(from), S(from+1), ... of a claim file are the sequence's terms from place `first` on, at the
/// parameter values given; times (-1)^n if `alternating`.
struct SequenceOf {
  std::string file;
  std::string number;
  std::size_t first = 0;  ///< place of S(from) in Sequence::terms
  Values parameters;
  bool alternating = false;
};

/// For the messages of GoogleTest.
inline std::ostream& operator<<(std::ostream& out, const Sequence& s) { return out << s.number; }
inline std::ostream& operator<<(std::ostream& out, const SequenceOf& s) {
  return out << s.number << " " << s.file;
}

[[nodiscard]] const std::vector<Sequence>& sequences();
[[nodiscard]] const std::vector<SequenceOf>& sequence_claims();

}  // namespace sumwright::testing
