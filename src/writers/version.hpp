// Versions that records and files name.
#pragma once

namespace sumwright::writers {

inline constexpr const char* kToolVersion = "0.1.0";
inline constexpr int kRecordFormat = 1;
inline constexpr int kClaimFormat = 1;
inline constexpr int kObligationsFormat = 1;

}  // namespace sumwright::writers
