import type { HelpTopic } from '../../../grammar/question.ts';

export interface Help {
  readonly title: string;
  readonly lines: readonly string[];
  /** Lines to try. Each runs as a test. */
  readonly examples: readonly string[];
}

const clauses =
  'After a ; you can add: level 90%, per 1,000, reference day shift, among "registered riders, May", source https://..., note "...", exact, only me.';

/** The help for each topic: what to type and what comes back. */
export const helpTopics = {
  overview: {
    title:
      'Type the figure as you were given it. The answer comes in the thread, with every fair reading of it.',
    lines: [
      'In a thread, write @Divisor and the line. "help counts", "help shares", "help stated", "help bare-counts" and "help alarm" say more.',
      clauses,
    ],
    examples: [
      'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
      '4.2% vs 2.6%',
      'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%',
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
      clauses,
    ],
    examples: [
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
      'no helmet: 44 of 75 injured, 38% of riders',
      'no helmet: 58.7% of cases, 38% of riders; of 75 cases',
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%; population 84,000',
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
