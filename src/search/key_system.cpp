// From a factored key equation to a table of distinct factor powers and products of them.
#include "search/key_system.hpp"

namespace sumwright::search {
namespace {

using algebra::Factored;
using algebra::Polynomial;

class Compiler {
 public:
  explicit Compiler(std::vector<KeySystem::FactorPower>& powers) : powers_(powers) {}

  KeySystem::Product compile(const Factored& value) {
    KeySystem::Product out;
    out.constant = value.constant.get_num();
    for (const auto& [base, exponent] : value.factors) {
      std::size_t at = 0;
      while (at < bases_.size() && !(powers_[at].exponent == exponent && bases_[at] == base)) {
        ++at;
      }
      if (at == bases_.size()) {
        bases_.push_back(base);
        powers_.push_back({base.to_terms(), exponent, base.depends_on(kIndex)});
      }
      out.powers.push_back(at);
    }
    return out;
  }

 private:
  std::vector<KeySystem::FactorPower>& powers_;
  std::vector<Polynomial> bases_;
};

}  // namespace

KeySystem::KeySystem(const KeyEquation& equation, const std::vector<Polynomial>& given_coefficients)
    : degree(equation.degree),
      equation_degree(equation.equation_degree),
      homogeneous_degree(equation.homogeneous_degree) {
  Compiler compiler(powers);
  up = compiler.compile(equation.up);
  down = compiler.compile(equation.down);
  for (const Factored& column : equation.columns) columns.push_back(compiler.compile(column));
  for (const Polynomial& coefficient : given_coefficients) given.push_back(coefficient.to_terms());
}

}  // namespace sumwright::search
