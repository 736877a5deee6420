/** Lines that people type, all invented and all from Harrowmere. Each is a test, a golden answer, and can be typed in the practice room. */
export const scenarios = {
  'helmets-and-admissions': 'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
  'helmets-with-nouns': 'no helmet: 44 of 75 injured, 38% of riders',
  'helmets-share-only': 'no helmet: 58.7% of cases, 38% of riders',
  'helmets-share-with-total': 'no helmet: 58.7% of cases, 38% of riders; of 75 cases',
  'helmets-with-population': 'cases: no helmet 44, helmet 31; coverage: no helmet 38%; population 84,000',
  'helmets-not-shown': 'cases: no helmet 17, helmet 14; coverage: no helmet 38%',
  'helmets-few-cases': 'cases: no helmet 9, helmet 2; coverage: no helmet 38%',
  'helmets-protective': 'cases: helmet 9, no helmet 41; coverage: helmet 62%',
  'three-doses-of-training':
    'cases: none 40, one course 12, two courses 23; coverage: none 30%, one course 15%, two courses 55%',
  'night-and-day-shifts': 'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
  'shifts-with-nouns': 'night: 18 incidents out of 1,204 shifts vs day: 9 incidents out of 2,377 shifts',
  'shifts-not-shown': 'night shift: 3 of 900 vs day shift: 4 of 800',
  'shifts-exact': 'night shift: 18 of 1,204 vs day shift: 9 of 2,377; exact',
  'shifts-at-90': 'night shift: 18 of 1,204 vs day shift: 9 of 2,377; level 90%; per 1,000',
  'market-less-often': 'market: 9 of 2,377 vs harbour: 18 of 1,204',
  'none-in-the-reference': 'old ferry: 5 of 56 vs new ferry: 0 of 29',
  'none-at-all': 'old ferry: 0 of 450 vs new ferry: 0 of 470',
  'all-in-both': 'old ferry: 10 of 10 vs new ferry: 20 of 20',
  'rare-in-many': 'old pump: 12 of 840,000 vs new pump: 3 of 910,000',
  'one-group-with-percentage': 'harbour ferry: 31 of 9,240 (3.4%)',
  'three-groups': 'early: 12 of 900, late: 30 of 1,100, night: 18 of 640; reference early',
  'hidden-count': 'north ward: <5 of 900 vs south ward: 31 of 1,100',
  'rows-by-outcome': '12 of 15 ill ate at the market, 40 of 100 well ate there',
  'before-and-after': 'before: 41 of 1,000 vs after: 52 of 1,100',
  'stated-percentages': '4.2% vs 2.6%',
  'stated-frequencies': '1 in 250 vs 1 in 400',
  'bare-counts': 'night 18 vs day 9',
  'without-labels': '18/1204 v 9/2377',
  'water-alarm': 'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%',
  'water-alarm-with-counts':
    'water alarm: sensitivity 46 of 50, false alarms 6 of 200, prevalence 1 in 250 wells',
  'water-alarm-one-sample': 'caught 46, missed 4, false alarms 30, quiet 920',
  'water-alarm-range': 'water alarm: sensitivity 92%, specificity 97%, prevalence 0.2-1% of wells',
} as const satisfies Record<string, string>;

export type ScenarioName = keyof typeof scenarios;
