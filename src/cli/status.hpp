// Exit statuses and the exceptions that carry them.
#pragma once

#include <stdexcept>

namespace sumwright::cli {

enum class Status {
  established = 0,
  refuted = 1,    ///< the claim, the evidence or a file is wrong
  unusable = 2,   ///< the input, the arguments or the output place cannot be used
  undecided = 3,  ///< not settled within the rules and limits
  fault = 4       ///< a fault of Sumwright
};

/// Something about the input or the output place; what() is a message for the user.
class Unusable : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

/// Sumwright contradicts itself; what() says how.
class Fault : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

}  // namespace sumwright::cli
