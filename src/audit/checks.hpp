// The checks of an audit, each from the Context to one Finding or a few.
#pragma once

#include <functional>
#include <string>
#include <vector>

#include "audit/context.hpp"

namespace sumwright::audit {

/// The polynomial equality and its normal form (equality.cpp).
void check_equality(const Context& context, std::vector<Finding>& findings);
/// The author's expressions against their atoms (conversions.cpp).
void check_conversions(Context& context, std::vector<Finding>& findings);
/// The term identity and the instances it is made of, at integer points (points.cpp).
void check_terms(Context& context, std::vector<Finding>& findings);
/// Ranges that move with n, added up directly (ranges.cpp).
void check_ranges(Context& context, std::vector<Finding>& findings);
/// The balances of ends, closed form and right side (balances.cpp).
void check_balances(Context& context, std::vector<Finding>& findings);
/// The leading coefficient and every other nonvanishing condition (nonzero.cpp).
void check_nonzero(const Context& context, std::vector<Finding>& findings);
/// The initial values (initial.cpp).
void check_initial_values(Context& context, std::vector<Finding>& findings);
/// That the argument has no gap: parts present, induction complete (structure.cpp).
void check_structure(const Context& context, std::vector<Finding>& findings);
/// That nothing is assumed beyond the claim (hypotheses_check.cpp).
void check_hypotheses(const Context& context, std::vector<Finding>& findings);
/// The recurrence proved against the one that the author wrote (recurrence.cpp).
void check_claimed_recurrence(Context& context, std::vector<Finding>& findings);
/// The sums added up for the first n (sums.cpp).
void check_sums(Context& context, std::vector<Finding>& findings);

/// left = right of an instance on its region, its steps and units; `use` says where it is used, the
/// places are where it is needed (points.cpp).
void check_instance(const Context& context, Check& check, const proof::Instance& instance,
                    const std::vector<Place>& places, const std::string& use);
/// One nonvanishing statement at the given places (nonzero.cpp).
void check_nonzero_at(const Context& context, Check& check, const proof::Nonzero& nonzero,
                      const std::vector<Place>& places, const std::string& what);
/// Terms, zero reasons and groups of a balance at the given places (balances.cpp).
void check_balance(const Context& context, Check& check, const proof::Balance& balance,
                   const std::vector<Place>& places);

}  // namespace sumwright::audit
