// F(n+i,k), G(n,k+1) and G(n,k) as numbers, from the data of a Proof.
#include "audit/terms.hpp"

#include "audit/atoms.hpp"

namespace sumwright::audit {

Value products_at(const Context& context, const proof::Conversion& conversion, const Place& place,
                  long shift) {
  Value out = Value::of(0);
  const Point point = context.at({place.sample, place.n + shift, place.k});
  for (const proof::Product& product : conversion.products)
    out = plus(out, value_of(product, point));
  return out;
}

Value shifted_term(Context& context, const Place& place, long shift) {
  const long n = place.n + shift;
  if (context.author.range(place.sample, n).contains(place.k))
    return context.author.term(place.sample, n, place.k);
  return products_at(context, context.proof.summand, place, shift);
}

Value upper_part(const Context& context, const Place& place) {
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  if (telescoping.certificate.terms.empty()) return Value::of(0);
  const Point point = context.at(place);
  const Point next = context.at({place.sample, place.n, place.k + 1});
  return times(
      times(value_of(telescoping.up, point), Value::of(value_of(telescoping.certificate, next))),
      value_of(telescoping.base.product, point));
}

Value lower_part(const Context& context, const Place& place) {
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  if (telescoping.certificate.terms.empty()) return Value::of(0);
  const Point point = context.at(place);
  return times(
      times(value_of(telescoping.down, point), Value::of(value_of(telescoping.certificate, point))),
      value_of(telescoping.base.product, point));
}

}  // namespace sumwright::audit
