// From the bytes of obligations.txt to entries and the claim's text: layout only.
#pragma once

#include <string>
#include <vector>

#include "writers/obligations_format.hpp"
#include "writers/obligations_reader.hpp"
#include "writers/obligations_values.hpp"

namespace sumwright::writers {

/// One entry with the row of the format that allows it.
struct ReadEntry {
  const SectionRow* section = nullptr;
  const KeyRow* row = nullptr;
  std::string key;
  PlacedValue value;
  claim::Place place;
};

struct ReadLines {
  std::vector<ReadEntry> entries;
  std::string block;  ///< the claim's lines, each with its line feed
  claim::Place block_place;
};

/// Checks layout, section order, known keys, repeated and missing ones. Throws claim::InputError.
[[nodiscard]] ReadLines read_lines(const claim::Source& source, const ObligationsLimits& limits);

}  // namespace sumwright::writers
