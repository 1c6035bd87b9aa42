// Conditions in the form in which people read them.
#pragma once

#include <string>
#include <string_view>

namespace sumwright::cli {

/// `-k - 1 >= 0` as `k <= -1`, `-n + m - 2 >= 0` as `n <= m - 2`: linear inequalities that start
/// with a minus sign, wherever they stand in the text. The rest is given back as it is.
[[nodiscard]] std::string readable_inequalities(std::string_view text);

}  // namespace sumwright::cli
