import { readingsOf } from '../../report/report.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import { limitsText } from './interval-text.ts';
import { plainLabel } from './labels.ts';
import { percent, ratio } from './numbers.ts';
import { quantityText } from './read-as.ts';

/** With three or more groups: what was counted in each, and its ratio against the reference, the header first. */
export function tableFor(report: Report): readonly (readonly string[])[] | null {
  const { question } = report;
  if (question.groups.length < 3) return null;
  const reference = plainLabel(question, question.reference);
  const what = question.kind === 'shares' ? 'Cases; coverage' : 'Given';
  const header = ['Group', what, `Ratio against ${reference}`, 'Interval'];
  const ratios = readingsOf(report, report.headline);
  const rows = question.groups.map((_, index) => {
    const reading = ratios.find(({ of }) => of === index);
    if (reading === undefined)
      return [plainLabel(question, index), given(report, index), '1 (compared with)', 'none'];
    return [
      plainLabel(question, index),
      given(report, index),
      reading.estimate === null
        ? reading.unbounded
          ? 'no upper end'
          : 'no value'
        : ratio(reading.estimate, 'full'),
      reading.interval === null ? 'none' : limitsText(reading, reading.interval, 'full'),
    ];
  });
  return [header, ...rows];
}

function given({ question }: Report, index: number): string {
  switch (question.kind) {
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
    case 'bare-counts': {
      const group = question.groups[index];
      return group === undefined ? '' : quantityText(group.cases);
    }
  }
}
