// Sums of the corpus as functions that a general library knows.
#pragma once

#include <ostream>
#include <string>
#include <vector>

#include "external/balls.hpp"

namespace sumwright::testing {

/// S(n) of a claim file equals `value(n, parameters)`; the source says where that is written, or
/// how it follows.
struct KnownFunction {
  std::string name;  ///< of the test
  std::string file;
  std::string source;
  Formula value;
  std::vector<Values> points;  ///< parameter values
  std::vector<long> large;     ///< n at which the recurrences are tried
};

/// For the messages of GoogleTest.
inline std::ostream& operator<<(std::ostream& out, const KnownFunction& function) {
  return out << function.name;
}

[[nodiscard]] const std::vector<KnownFunction>& known_functions();

}  // namespace sumwright::testing
