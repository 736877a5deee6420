import { readingsOf } from '../../report/report.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import { limitsText } from './interval-text.ts';
import { plainLabel } from './labels.ts';
import { percent, ratio } from './numbers.ts';
import { quantityText, rateText } from './read-as.ts';
import { strataTable } from './strata-words.ts';

/** The heading of the last column, where the groups are everybody. */
export const restColumn = 'Against the rest';

/** With three or more groups: what was counted in each, and its ratio against the reference, the header first. */
export function tableFor(report: Report): readonly (readonly string[])[] | null {
  const { question } = report;
  if (question.kind === 'strata') return strataTable(report, question);
  if (question.groups.length < 3) return null;
  const reference = plainLabel(question, question.reference);
  const what = question.kind === 'shares' ? 'Cases; coverage' : 'Given';
  const rest = report.againstRest ?? [];
  const withRest = (of: number) => {
    const reading = rest.find((each) => each.of === of);
    if (reading === undefined) return [];
    const value = reading.estimate === null ? 'no value' : ratio(reading.estimate, 'full');
    return [
      reading.interval === null ? value : `${value} (${limitsText(reading, reading.interval, 'full')})`,
    ];
  };
  const header = [
    'Group',
    what,
    `Ratio against ${reference}`,
    'Interval',
    ...(rest.length > 0 ? [restColumn] : []),
  ];
  const ratios = readingsOf(report, report.headline);
  const rows = question.groups.map((_, index) => {
    const reading = ratios.find(({ of }) => of === index);
    if (reading === undefined)
      return [
        plainLabel(question, index),
        given(report, index),
        '1 (compared with)',
        'none',
        ...withRest(index),
      ];
    return [
      plainLabel(question, index),
      given(report, index),
      reading.estimate === null
        ? reading.unbounded
          ? 'no upper end'
          : 'no value'
        : ratio(reading.estimate, 'full'),
      reading.interval === null ? 'none' : limitsText(reading, reading.interval, 'full'),
      ...withRest(index),
    ];
  });
  return [header, ...rows];
}

function given({ question }: Report, index: number): string {
  switch (question.kind) {
    case 'strata':
      return '';
    case 'counts': {
      const group = question.groups[index];
      if (group === undefined) return '';
      return `${quantityText(group.cases)} of ${quantityText(group.total)} (${percent(group.cases.value / group.total.value, 'full')})`;
    }
    case 'shares': {
      const group = question.groups[index];
      if (group === undefined) return '';
      const share = group.cases === null ? quantityText(group.caseShare) : quantityText(group.cases);
      return `${share}; ${group.coverage.text}`;
    }
    case 'stated':
      return question.groups[index]?.share.text ?? '';
    case 'rates':
      return rateText(question, index);
    case 'bare-counts': {
      const group = question.groups[index];
      return group === undefined ? '' : quantityText(group.cases);
    }
  }
}
