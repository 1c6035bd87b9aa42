// Versions that records and files name.
#pragma once

namespace sumwright::writers {

#ifdef SUMWRIGHT_VERSION
inline constexpr const char* kToolVersion = SUMWRIGHT_VERSION;
#else
inline constexpr const char* kToolVersion = "unversioned";
#endif
inline constexpr int kRecordFormat = 1;
inline constexpr int kClaimFormat = 1;
inline constexpr int kObligationsFormat = 1;

}  // namespace sumwright::writers
