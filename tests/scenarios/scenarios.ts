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
  'helmets-coverage-range': 'cases: no helmet 44, helmet 31; coverage: helmet 55-65% of riders',
  'helmets-coverage-sample': 'cases: no helmet 44, helmet 31; coverage: no helmet 190 of 500 riders',
  'helmets-nobody-in-the-sample': 'cases: no helmet 6, helmet 61; coverage: no helmet 0 of 120 riders',
  'helmets-coverage-interval': 'no helmet: 44 of 75 injured, 38% (34 to 42) of riders',
  'helmets-coverage-about': 'cases: no helmet 44, helmet 31; coverage: no helmet about 38%',
  'helmets-coverage-grew': 'cases: helmet 31, no helmet 44; coverage: helmet from 20% to 60% of riders',
  'helmets-coverage-grew-far': 'cases: helmet 8, no helmet 67; coverage: helmet from 5% to 90% of riders',
  'helmets-coverage-by-month':
    'helmet: 31 of 75 injured; coverage by month: Mar 20%, Apr 30%, May 45%, Jun 60% of riders; cases by month: 30, 25, 12, 8',
  'helmets-group-unknown': 'cases: no helmet 44, helmet 31, unknown 12; coverage: no helmet 38%',
  'helmets-many-unknown': 'cases: no helmet 90, helmet 15, unknown 60; coverage: no helmet 38% of riders',
  'helmets-try-coverages': 'cases: no helmet 44, helmet 31; coverage: no helmet 38%; try 30%, 38%, 50%',
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
  'buses-and-incidents': 'depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days',
  'pumps-not-shown': 'old pump: 4 faults in 5,200 hours vs new pump: 3 in 8,800 hours',
  'lines-as-stated': 'east line: 3 per 1,000 bus-days vs west line: 2 per 1,000 bus-days',
  'three-depots': 'depot A: 14 in 5,200 bus-days, depot B: 9 in 8,800 bus-days, depot C: 3 in 4,000 bus-days',
  'delays-up': 'ferry delays from 412 to 530',
  'delays-over-two-times': 'from 412 in 31 days to 530 in 28 days',
  'late-crossings-in-percent': 'from 4.4% to 5.2%',
  'late-crossings-last-year': 'last year: 412 of 10,400 crossings vs this year: 530 of 12,900 crossings',
  'layers-of-age':
    'by age: under 40: night 30 of 900 vs day 200 of 9,000 | 40 and over: night 160 of 2,000 vs day 6 of 100',
  'layers-turned-round':
    'by age: under 40: night 3 of 900 vs day 40 of 9,000 | 40 and over: night 80 of 2,000 vs day 6 of 100',
  'layers-turned-round-and-shown':
    'by depot: north: new bus 30 of 1,000 vs old bus 540 of 9,000 | south: new bus 1,200 of 9,000 vs old bus 270 of 1,000',
  'layers-of-rates':
    'by line: east: new bus 4 in 1,200 days vs old bus 9 in 2,000 days | west: new bus 2 in 900 days vs old bus 6 in 1,500 days',
  'layers-of-helmets':
    'by age: under 40: no helmet 12 of 32 cases, 30% of riders | 40 and over: no helmet 32 of 43 cases, 45% of riders',
  'pasted-table':
    'age\tnight cases\tnight total\tday cases\tday total\nunder 40\t30\t900\t200\t9,000\n40 and over\t160\t2,000\t6\t100',
  'layers-too-small': 'by ward: north: night 1 of 4 vs day 2 of 9 | south: night 3 of 12 vs day 1 of 14',
  'ward-and-town': 'harbour ward: 31 of 9,240 vs all: 210 of 88,000',
  'whole-register-in-clusters':
    'night shift: 18 of 1,204 vs day shift: 9 of 2,377; design effect 1.8; counted: everyone',
  'stated-percentages': '4.2% vs 2.6%',
  'stated-frequencies': '1 in 250 vs 1 in 400',
  'bare-counts': 'night 18 vs day 9',
  'without-labels': '18/1204 v 9/2377',
  'water-alarm': 'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%',
  'water-alarm-with-counts':
    'water alarm: sensitivity 46 of 50, false alarms 6 of 200, prevalence 1 in 250 wells',
  'water-alarm-one-sample': 'caught 46, missed 4, false alarms 30, quiet 920',
  'water-alarm-range': 'water alarm: sensitivity 92%, specificity 97%, prevalence 0.2-1% of wells',
  'says-agrees':
    'night: 18 incidents out of 1,204 shifts vs day: 9 incidents out of 2,377 shifts; says "Night shifts had incidents 3.9 times as often"',
  'says-rounded-first': 'night shift: 18 of 1,204 vs day shift: 9 of 2,377; says 275% higher',
  'says-times-more': 'night shift: 18 of 1,204 vs day shift: 9 of 2,377; says 4 times more',
  'says-with-interval':
    'night shift: 18 of 1,204 vs day shift: 9 of 2,377; says "3.95 (95% CI 1.78 to 8.76)"',
  'says-points-as-per-cent': 'late crossings from 4.4% to 5.2% says up 0.8%',
  'says-from-the-later': 'ferry delays from 412 to 530; says 22% more',
  'says-share-as-risk':
    'no helmet: 44 of 75 injured, 38% of riders; says "59% of riders without a helmet were injured"',
  'says-not-shown': 'night shift: 3 of 900 vs day shift: 4 of 800; says a third fewer',
  'says-moved-point': 'harbour ferry: 31 of 9,240; says 3.4%',
  'says-no-figure': 'night shift: 18 of 1,204 vs day shift: 9 of 2,377; says "Nights are the problem"',
} as const satisfies Record<string, string>;

export type ScenarioName = keyof typeof scenarios;
