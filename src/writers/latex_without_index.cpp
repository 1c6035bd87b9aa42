// Claims without an index: nothing is summed, the two sides are compared as they stand.
#include <fmt/format.h>

#include "writers/latex_document.hpp"

namespace sumwright::writers {

bool LatexDocument::without_coefficients() const {
  return !proof_.telescoping && proof_.recurrence_text.size() == 1 &&
         proof_.recurrence_text[0] == "1";
}

// Names for what the balance of both sides speaks of: the term F(n) and the coefficients.
void LatexDocument::single_term() {
  head("The two sides");
  say(fmt::format("Write ${}$ for {}; in factorials and powers,\n", inline_tex(at('F', 0)),
                  claim_.is_equality() ? "the left side of " + reference("claim")
                                       : "the term $" + inline_tex(of_running('S', 0)) + "$"));
  parts('F', at('F', 0), proof_.summand.products);
  if (without_coefficients()) return;
  if (coefficients_printable()) {
    say("Put\n");
    coefficient_list(false);
  } else {
    say(fmt::format("Write ${}_{{i}}({})$ for the coefficient of ${}({}+i)$ in the recurrence. ",
                    names_.letter('a'), running(0), names_.letter('S'), running(0)));
  }
}

}  // namespace sumwright::writers
