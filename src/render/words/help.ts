import type { HelpTopic } from '../../../grammar/question.ts';

export interface Help {
  readonly title: string;
  readonly lines: readonly string[];
  /** Lines to try. Each runs as a test. */
  readonly examples: readonly string[];
}

const clauses =
  'After a ; you can add: level 90%, per 1,000, reference day shift, among "registered riders, May", source https://..., note "...", exact, design effect 1.8, counted: everyone, only me; and says "...", the sentence that you want to use.';

/** The help for each topic: what to type and what comes back. */
export const helpTopics = {
  overview: {
    title:
      'Type the figure as you were given it. The answer comes in the thread, with every fair reading of it.',
    lines: [
      'In a thread, write @Divisor and the line. "help counts", and in the same way shares, rates, change, strata, alarm, stated and bare-counts, say more.',
      clauses,
    ],
    examples: [
      'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
      '4.2% vs 2.6%',
      'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%',
      'from 412 to 530; says "up 29%"',
    ],
  },
  counts: {
    title: 'How many, out of how many, in one group or more.',
    lines: [
      'The last group is what the others are compared with, unless you name another after "reference".',
      clauses,
    ],
    examples: [
      'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
      '18/1204 v 9/2377',
      'harbour ferry: 31 of 9,240 (0.34%)',
      'early 12 of 900, late 30 of 1,100, night 18 of 640; reference early',
    ],
  },
  shares: {
    title: 'Cases by group, beside the share of everybody that each group has.',
    lines: [
      'From the two comes the ratio per rider (or per shift, per person), which the share of cases alone does not tell.',
      'Coverage may be a range, a sample, a figure with its interval, or have grown or fallen; cases may be of unknown group; "try 30%, 38%" shows the ratio at several coverages.',
      clauses,
    ],
    examples: [
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
      'no helmet: 44 of 75 injured, 38% of riders',
      'no helmet: 58.7% of cases, 38% of riders; of 75 cases',
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%; population 84,000',
      'cases: no helmet 44, helmet 31; coverage: helmet 55-65%',
      'cases: no helmet 44, helmet 31; coverage: helmet 310 of 500',
      'cases: no helmet 44, helmet 31; coverage: helmet 62% (58 to 66)',
      'cases: no helmet 44, helmet 31; coverage: helmet from 20% to 60%',
      'helmet: 31 of 75; coverage by month: Jan 20%, Feb 30%, Mar 45%; cases by month: 30, 25, 20',
      'cases: no helmet 44, helmet 31, unknown 12; coverage: no helmet 38%',
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%; try 30%, 38%, 50%',
    ],
  },
  stated: {
    title: 'Percentages or frequencies without the counts behind them.',
    lines: ['There is no interval without counts; the answer says what rounding alone allows.', clauses],
    examples: [
      '4.2% vs 2.6%',
      'night: 1 in 250 vs day: 1 in 400',
      'new ferry: 3 per 1,000 vs old ferry: 2 per 1,000',
    ],
  },
  rates: {
    title: 'Events over time, distance or another exposure.',
    lines: [
      'Both groups in one unit. Over a round base (3 per 1,000 hours) it is a stated rate and has no interval.',
      clauses,
    ],
    examples: [
      'depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days',
      'old pump 14/5200h new pump 9/8800h',
      'east line: 3 per 1,000 crossings per year vs west line: 2 per 1,000 crossings per year',
    ],
  },
  change: {
    title: 'The same thing at two times: the earlier is what the later is compared with.',
    lines: ['Counts, counts of totals, percentages, or counts with the length of each time.', clauses],
    examples: [
      'delays from 412 to 530',
      '530, up from 412',
      'from 412 in 31 days to 530 in 28 days',
      'from 41 of 1,000 to 52 of 1,100',
      'from 4.4% to 5.2%',
      '412 last year 530 this year',
    ],
  },
  strata: {
    title: 'The same groups within layers, such as age or place.',
    lines: [
      'One layer a line, or a bar between them. The answer compares within the layers and says so where all together points elsewhere.',
      clauses,
    ],
    examples: [
      'by age: under 40: night 3 of 900 vs day 40 of 9,000 | 40 and over: night 80 of 2,000 vs day 6 of 100',
      'by line: east: new bus 4 in 1,200 days vs old bus 9 in 2,000 days | west: new bus 2 in 900 days vs old bus 6 in 1,500 days',
      'by age: under 40: no helmet 12 of 32 cases, 30% of riders | 40 and over: no helmet 32 of 43 cases, 45% of riders',
    ],
  },
  'bare-counts': {
    title: 'Counts whose totals nobody stated.',
    lines: ['The answer says how many times as many, and asks: out of how many?', clauses],
    examples: ['night 18 vs day 9'],
  },
  alarm: {
    title: 'A test, a filter or an alert: how many of its alarms are real.',
    lines: [
      'It takes sensitivity, specificity (or the false alarm rate) and prevalence, in any order; or the four counts. "46 of 50" in place of a percentage gives an interval.',
      clauses,
    ],
    examples: [
      'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%',
      'water alarm: sensitivity 46 of 50, false alarm rate 6 of 200, prevalence 1 in 250 wells',
      'alarm: sensitivity 92%, specificity 97%, prevalence 0.2-1%',
      'caught 46, missed 4, false alarms 30, quiet 920',
    ],
  },
} satisfies Record<HelpTopic, Help>;

export const helpText = (topic: HelpTopic): Help => helpTopics[topic];
