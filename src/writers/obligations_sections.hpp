// The sections of obligations.txt that carry the argument; used by obligations.cpp only.
#pragma once

#include <string>

#include "proof/proof.hpp"
#include "writers/obligations_document.hpp"
#include "writers/print_text.hpp"

namespace sumwright::writers {

/// An author's text as products of atoms: summand, closed form or right side.
void write_conversion(ObligationsDocument& out, const TextPrinter& print,
                      const proof::Conversion& conversion);

/// Base term, multiples of it, and the laws by which they are reached.
void write_base(ObligationsDocument& out, const TextPrinter& print,
                const proof::Telescoping& telescoping);

/// The one polynomial equality, in terms of the base section, and its normal form.
void write_equality(ObligationsDocument& out, const TextPrinter& print, const proof::Proof& proof);

/// How the author's ranges differ from the common range.
void write_ranges(ObligationsDocument& out, const TextPrinter& print, const proof::Proof& proof);

/// One balance, keys behind `prefix` (empty, or `value 3 `); `weighted`: its terms are multiplied
/// by the weight of the telescoping identity.
void write_balance(ObligationsDocument& out, const TextPrinter& print, const std::string& prefix,
                   const proof::Balance& balance, bool weighted);

/// A nonvanishing polynomial and why each factor is nonzero.
void write_nonzero(ObligationsDocument& out, const TextPrinter& print, const std::string& key,
                   const proof::Nonzero& nonzero);

/// The finitely many values, in order.
void write_initial_values(ObligationsDocument& out, const TextPrinter& print,
                          const proof::Proof& proof);

}  // namespace sumwright::writers
