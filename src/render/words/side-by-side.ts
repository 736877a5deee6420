import type { SharesQuestion } from '../../../grammar/question.ts';
import type { RatioVariant, RatioVariants } from '../../report/ratio-variants.ts';
import type { Limits } from '../../report/reading.ts';
import { readingsOf } from '../../report/report.ts';
import type { Report } from '../../report/report.ts';
import { label, plainLabel } from './labels.ts';
import { count, fixed, percent, ratio } from './numbers.ts';
import type { Digits } from './numbers.ts';
import type { Side } from './telling.ts';

/** The ratios that stand beside the headline's, in words: a line for the answer, a table, and the working. */
export function sidesFor(report: Report): readonly Side[] {
  const { question, variants } = report;
  if (question.kind !== 'shares' || variants === undefined) return [];
  return variants.map((each) => sideOf(report, question, each));
}

function sideOf(report: Report, question: SharesQuestion, variants: RatioVariants): Side {
  const of = plainLabel(question, variants.coverageOf);
  // Only where it is not the group that the answer is about.
  const whose =
    variants.rows[0]?.of === variants.coverageOf ? '' : ` of ${label(question, variants.coverageOf)}`;
  const table = (first: string, name: (row: RatioVariant) => string) => [
    [first, 'Ratio', 'Interval'],
    ...variants.rows.map((row) => [name(row), valueText(row, 'full'), limitsText(row.interval)]),
  ];
  switch (variants.topic) {
    case 'growth':
      return {
        topic: 'growth',
        title: 'Coverage that changed, two assumptions',
        line: growthLine(variants),
        table: table('If', growthName),
        working:
          'Constant risk: the mean coverage (person-time argument). Even cases: the ratio R at which the mean of Rc/(1 - c + Rc) over the coverage is the share of cases; derived for this program, checked by quadrature. Each with the limits of the share of cases carried through (Wilson 1927).',
      };
    case 'unknown':
      return {
        topic: 'unknown',
        title: 'Cases of unknown group',
        line: unknownLine(report, question, variants),
        table: table('If the unknown', (row) => unknownName(question, row)),
        working:
          'All unknown cases to the one group, then to the other; the interval is the outermost of both (Horowitz & Manski 2000).',
      };
    case 'tried':
      return {
        topic: 'tried',
        title: `Ratio over several coverages of ${of}`,
        line: `Ratio at a coverage${whose} of ${triedList(variants)}.`,
        table: table(`Coverage, ${of}`, ({ coverage }) => share(coverage)),
        working: 'Each coverage taken as exact, the cases as they are (Orenstein 1985).',
      };
    case 'sensitivity':
      return {
        topic: 'sensitivity',
        title: 'One point more of coverage',
        line: sensitivityLine(question, variants),
        table: null,
        working: `d ln R/dc = ${variants.slope !== null && variants.slope > 0 ? '' : '-'}1/(c(1 - c)) = ${fixed(variants.slope ?? 0, 4)}, c the coverage of ${of} (Orenstein 1985).`,
      };
  }
}

const share = (value: number | null) => (value === null ? '' : `${Number((value * 100).toFixed(10))}%`);

function valueText({ estimate, unbounded }: RatioVariant, digits: Digits): string {
  if (estimate === null) return unbounded ? 'no upper end' : 'no value';
  return ratio(estimate, digits);
}

function limitsText(limits: Limits | null): string {
  if (limits === null) return 'none';
  const write = (limit: number | null, none: string) => (limit === null ? none : ratio(limit, 'full'));
  return `${write(limits.low, 'no lower limit')} to ${write(limits.high, 'no upper limit')}`;
}

function growthName({ id, coverage }: RatioVariant): string {
  switch (id) {
    case 'constant-risk':
      return `the risk outside the group stayed the same (mean coverage ${share(coverage)})`;
    case 'even-cases':
      return 'the cases came evenly over the time';
    default:
      return `coverage had been ${share(coverage)}, as at the end, all the time`;
  }
}

/** "0.13 if the risk outside the group stayed the same; 0.083 if the cases came evenly; 0.013 at the closing 90%." */
function growthLine({ rows }: RatioVariants): string {
  const parts = rows.map((row) => {
    const value = valueText(row, 'short');
    switch (row.id) {
      case 'constant-risk':
        return `${value} if the risk outside the group stayed the same`;
      case 'even-cases':
        return `${value} if the cases came evenly`;
      default:
        return `${value} had coverage been ${share(row.coverage)} throughout`;
    }
  });
  return `Ratio: ${parts.join('; ')}.`;
}

function unknownName(question: SharesQuestion, { id, of, against }: RatioVariant): string {
  switch (id) {
    case 'all-in-group':
      return `all belong to ${plainLabel(question, of)}`;
    case 'all-in-reference':
      return `all belong to ${plainLabel(question, against)}`;
    default:
      return 'split like the known';
  }
}

/** "2.3 if the 12 unknown split like the known; between 1.7 and 3 however they split; with chance 1.11 to 4.5." */
function unknownLine(report: Report, question: SharesQuestion, { rows }: RatioVariants): string {
  const value = (id: RatioVariant['id']) => {
    const row = rows.find((each) => each.id === id);
    return row === undefined ? '' : valueText(row, 'short');
  };
  const interval = readingsOf(report, 'risk-ratio')[0]?.interval ?? null;
  const chance =
    interval === null
      ? ''
      : `; with chance ${interval.low === null ? 'no lower limit' : ratio(interval.low, 'short')} to ${interval.high === null ? 'no upper limit' : ratio(interval.high, 'short')}`;
  const unknown = count(question.unknownCases?.value ?? 0);
  return `Ratio: ${value('like-the-known')} if the ${unknown} unknown split like the known; between ${value('all-in-reference')} and ${value('all-in-group')} however they split${chance}.`;
}

function triedList({ rows }: RatioVariants): string {
  return rows.map((row) => `${share(row.coverage)}: ${valueText(row, 'short')}`).join('; ');
}

/** From this slope on a percentage for one point would mislead: the curve bends too much. */
const steep = 0.2;

/** "Each point more coverage of no helmet lowers the ratio by about 4.2%: at 37%, 38% and 39% it is 2.42, 2.32 and 2.22." */
function sensitivityLine(question: SharesQuestion, { rows, slope, coverageOf }: RatioVariants): string {
  const change = Math.abs(slope ?? 0) / 100;
  const at = listed(rows.map(({ coverage }) => share(coverage)));
  const values = listed(rows.map((row) => valueText(row, 'full')));
  const group = label(question, coverageOf);
  const direction = slope !== null && slope > 0 ? 'raises' : 'lowers';
  return change < steep
    ? `Each point more coverage of ${group} ${direction} the ratio by about ${percent(change, 'short')}: at ${at} it is ${values}.`
    : `A point more coverage of ${group} ${direction} the ratio a great deal: at ${at} it is ${values}.`;
}

const listed = (items: readonly string[]) =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1) ?? ''}`;
