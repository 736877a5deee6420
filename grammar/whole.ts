import { diagnosis } from './diagnosis.ts';
import { grouped } from './numbers.ts';
import { exactCount, refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { CountsGroup } from './question.ts';
import type { Setting } from './setting.ts';
import { referenceOf } from './naming.ts';

/** The groups without one that contains the others, and the reference among them where it moved. */
interface Apart {
  readonly groups: readonly CountsGroup[];
  readonly reference: number | null;
}

const wholeName =
  /^(?:all|total|totals|overall|(?:the )?whole(?: \w+)?|everyone|everybody|altogether|all together|all \w+|both)$/i;
const rest = 'the rest';

/**
 * A part cannot be compared with the whole that contains it: the part is taken out, and what remains is "the rest". A whole that
 * is just the sum of the others is a total row: it is left out. A whole smaller than its parts is refused.
 */
export function withoutWhole(
  groups: readonly CountsGroup[],
  labels: readonly (string | null)[],
  setting: Setting,
): Settled<Apart> {
  const at = groups.findIndex(({ label }) => label !== null && wholeName.test(label));
  const whole = groups[at];
  const parts = groups.filter((group) => group !== whole);
  if (whole === undefined || parts.length === 0) return settled({ groups, reference: null });
  const exact = groups.every(
    ({ cases, total }) => cases.precision === 'exact' && total.precision === 'exact',
  );
  if (!exact) return refused(diagnosis('whole-not-exact', whole.span, [whole.label ?? '']));
  const cases = parts.reduce((left, part) => left - part.cases.value, whole.cases.value);
  const total = parts.reduce((left, part) => left - part.total.value, whole.total.value);
  const text = `${whole.cases.text} of ${whole.total.text}`;
  if (parts.length > 1 && cases === 0 && total === 0) {
    const known = labels.filter((_, index) => index !== at);
    const reference = referenceOf(known, setting);
    return reference.ok
      ? settled({ groups: parts, reference: reference.value }, [
          { id: 'total-left-out', text: `${whole.label ?? ''}: ${text}`, readAs: '', span: whole.span },
        ])
      : reference;
  }
  if (cases < 0 || total <= 0 || cases > total)
    return refused(diagnosis('whole-too-small', whole.span, [`${whole.label ?? ''}: ${text}`, sumOf(parts)]));
  const others: CountsGroup = {
    label: rest,
    cases: exactCount(cases, grouped(cases), whole.span),
    total: exactCount(total, grouped(total), whole.span),
    stated: null,
    span: whole.span,
  };
  const readAs = `${grouped(cases)} of ${grouped(total)}`;
  return settled({ groups: groups.map((group) => (group === whole ? others : group)), reference: null }, [
    { id: 'whole-taken-apart', text, readAs, span: whole.span },
  ]);
}

const sumOf = (parts: readonly CountsGroup[]) =>
  `${grouped(parts.reduce((sum, { cases }) => sum + cases.value, 0))} of ${grouped(parts.reduce((sum, { total }) => sum + total.value, 0))}`;
