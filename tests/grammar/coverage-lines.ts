/** Lines whose coverage is not one number, or with cases of unknown group: what is read, and what is refused. */

const cases = 'cases: no helmet 44, helmet 31';
const range = `${cases}; coverage: helmet 55-65%`;
const sample = `${cases}; coverage: helmet 310 of 500`;
const interval = `${cases}; coverage: no helmet 38% (34% to 42%)`;
const grew = `${cases}; coverage: helmet from 20% to 60%`;
const byMonth =
  'helmet: 31 of 75 cases; coverage by month: Jan 20%, Feb 30%, Mar 45%; cases by month: 30, 25, 20';
const unknown = 'cases: no helmet 44, helmet 31, unknown 12; coverage: no helmet 38%';
const tried = `${cases}; coverage: no helmet 38%; try 30%, 38%, 50%`;

/** Typed line, canonical form. */
export const coverageCorpus: readonly (readonly [string, string])[] = [
  [range, range],
  [`${cases}; coverage: helmet 55% to 65%`, range],
  [`${cases}; coverage: helmet 55 to 65%`, range],
  [`${cases}; coverage: helmet 55 to 65 per cent`, range],
  [`${cases}; coverage: helmet between 55 and 65%`, range],
  [`${cases}; coverage: helmet between 55% and 65%`, range],
  [`${cases}; coverage: helmet 55%-65%`, range],
  [`${cases}; coverage: helmet 55 \u2013 65 %`, range],
  [`${cases}; coverage: helmet 55\u201365%`, range],
  [`${cases}; coverage: helmet about 55-65%`, range],
  [`${cases}; coverage: 55-65% helmet`, range],
  [`${cases}; coverage: helmet 55-65%, no helmet 35-45%`, `${cases}; coverage: no helmet 35-45%`],
  [`${cases}; coverage: helmet 55.5% to 65% of riders`, `${cases}; coverage: helmet 55.5-65% of riders`],
  ['no helmet: 44 of 75 injured, 35-41% of riders', 'no helmet: 44 of 75 injured; coverage 35-41% of riders'],
  ['44 of 75 no helmet, coverage 35 to 41%', 'no helmet: 44 of 75 cases; coverage 35-41%'],
  [`${range} level 90%`, `${range}; level 90%`],

  [sample, sample],
  [`${cases}; coverage: helmet 310/500`, sample],
  [`${cases}; coverage: helmet 310 out of 500`, sample],
  [`${cases}; coverage: 310 of 500 helmet`, sample],
  [`${cases}; coverage: helmet 62% (310 of 500)`, sample],
  [`${cases}; coverage: helmet 310 of 500 (62%)`, sample],
  [`${cases}; coverage: helmet 310 of 500, no helmet 190 of 500`, `${cases}; coverage: no helmet 190 of 500`],
  [`${cases}; coverage: helmet 310 of 500 riders`, `${cases}; coverage: helmet 310 of 500 riders`],
  [`${cases}; coverage: helmet 0 of 500`, `${cases}; coverage: helmet 0 of 500`],
  [`${cases}; coverage: helmet 500 of 500`, `${cases}; coverage: helmet 500 of 500`],
  [`${cases}; coverage: helmet 62% of 50`, `${cases}; coverage: helmet 31 of 50`],
  ['44 of 75 no helmet, coverage 190 of 500', 'no helmet: 44 of 75 cases; coverage 190 of 500'],
  [
    'no helmet: 44 of 75 injured; coverage 190 of 500 riders',
    'no helmet: 44 of 75 injured; coverage 190 of 500 riders',
  ],

  [interval, interval],
  [`${cases}; coverage: no helmet 38% (34 to 42)`, interval],
  [`${cases}; coverage: no helmet 38% (34-42%)`, interval],
  [`${cases}; coverage: no helmet 38% (34\u201342)`, interval],
  [`${cases}; coverage: no helmet 38% [34, 42]`, interval],
  [`${cases}; coverage: no helmet 38% (34% - 42%)`, interval],
  [
    `${cases}; coverage: no helmet 38% (95% CI 34 to 42)`,
    `${cases}; coverage: no helmet 38% (95% interval 34% to 42%)`,
  ],
  [
    `${cases}; coverage: no helmet 38% (90% confidence interval: 34 to 42) of riders`,
    `${cases}; coverage: no helmet 38% (90% interval 34% to 42%) of riders`,
  ],
  [
    'no helmet: 44 of 75 injured, 38% (34 to 42) of riders',
    'no helmet: 44 of 75 injured; coverage 38% (34% to 42%) of riders',
  ],
  ['44 of 75 no helmet, coverage 38% (34 to 42)', 'no helmet: 44 of 75 cases; coverage 38% (34% to 42%)'],

  [grew, grew],
  [`${cases}; coverage: helmet from 20 to 60%`, grew],
  [`${cases}; coverage: helmet grew from 20% to 60%`, grew],
  [`${cases}; coverage: helmet up from 20% to 60%`, grew],
  [`${cases}; coverage: helmet 20% \u2192 60%`, grew],
  [`${cases}; coverage: helmet 20% -> 60%`, grew],
  [
    `${cases}; coverage: helmet fell from 60% to 20% of riders`,
    `${cases}; coverage: helmet from 60% to 20% of riders`,
  ],
  [`${cases}; coverage: helmet from 0% to 40%`, `${cases}; coverage: helmet from 0% to 40%`],
  [`${cases}; coverage: helmet from 40% to 100%`, `${cases}; coverage: helmet from 40% to 100%`],
  [`${cases}; coverage: helmet from about 20% to about 60%`, grew],

  [byMonth, byMonth],
  [
    'helmet: 31 of 75; coverage by month: 20%, 30%, 45%; cases by month: 30, 25, 20',
    'helmet: 31 of 75 cases; coverage by month: 20%, 30%, 45%; cases by month: 30, 25, 20',
  ],
  [
    'helmet: 31 of 75 injured\ncoverage by week: w1 20%, w2 30%, w3 45% of riders\ncases by week: w1 30, w2 25, w3 20',
    'helmet: 31 of 75 injured; coverage by week: "w1" 20%, "w2" 30%, "w3" 45% of riders; cases by week: 30, 25, 20',
  ],
  [
    `${cases}; coverage of helmet by month: Jan 20%, Feb 30%, Mar 45%; cases by month: 30, 25, 20`,
    `${cases}; coverage of helmet by month: Jan 20%, Feb 30%, Mar 45%; cases by month: 30, 25, 20`,
  ],
  [
    `coverage by month: helmet: Jan 20%, Feb 30%, Mar 45%; cases by month: Jan 30, Feb 25, Mar 20; ${cases}`,
    `${cases}; coverage of helmet by month: Jan 20%, Feb 30%, Mar 45%; cases by month: 30, 25, 20`,
  ],
  [`helmet: 31 of 75\nmonth coverage cases\nJan 20% 30\nFeb 30% 25\nMar 45% 20`, byMonth],
  [`helmet: 31 of 75\nmonth\tcases\tcoverage\nJan\t30\t20%\nFeb\t25\t30%\nMar\t20\t45%`, byMonth],

  [unknown, unknown],
  ['cases: no helmet 44, helmet 31, ? 12; coverage: no helmet 38%', unknown],
  ['cases: no helmet 44, helmet 31, not known 12; coverage: no helmet 38%', unknown],
  ['cases: 44 no helmet, 31 helmet, 12 not recorded; coverage: no helmet 38%', unknown],
  ['no helmet 44, unknown 12, helmet 31; coverage no helmet 38%', unknown],
  [`${cases}; unknown 12; coverage: no helmet 38%`, unknown],
  [`cases: no helmet 44, helmet 31, unknown 0; coverage: no helmet 38%`, `${cases}; coverage: no helmet 38%`],
  [
    'cases: known 44, unknown 31; coverage: unknown 38%',
    'cases: known 44, unknown 31; coverage: unknown 38%',
  ],

  [tried, tried],
  [`${cases}; coverage: no helmet 38%; try 30, 38 and 50%`, tried],
  [`${cases}; coverage: no helmet 38%\ntry 30% 38% 50%`, tried],
];

/** Typed line, message id, the piece that the place shows. */
export const coverageRefusals: readonly (readonly [string, string, string])[] = [
  [`${cases}; coverage: helmet 65-55%`, 'coverage-upside-down', '65-55%'],
  [`${cases}; coverage: helmet 55% to 55%`, 'coverage-upside-down', '55% to 55%'],
  [`${cases}; coverage: helmet 0-55%`, 'range-at-end', '0-55%'],
  [`${cases}; coverage: helmet 55 to 100%`, 'range-at-end', '55 to 100%'],
  [`${cases}; coverage: helmet 55 to 120%`, 'share-above-one', '55 to 120%'],
  [`${cases}; coverage: helmet 310`, 'coverage-no-share', 'helmet 310'],
  [`${cases}; coverage: helmet 510 of 500`, 'more-cases-than-people', '510 of 500'],
  [`${cases}; coverage: helmet 0 of 0`, 'total-zero', '0'],
  [`${cases}; coverage: helmet 62% of 500`, 'sample-as-count', '62% of 500'],
  [`${cases}; coverage: helmet 310 of 500 (52%)`, 'sample-and-percentage', '310 of 500'],
  [`${cases}; coverage: no helmet 38% (39 to 42)`, 'interval-without-value', '38% (39 to 42)'],
  [`${cases}; coverage: no helmet 38% (42 to 34)`, 'interval-without-value', '38% (42 to 34)'],
  [
    `${cases}; coverage: no helmet 38% (34 to 42); population 84,000`,
    'population-and-form',
    'population 84,000',
  ],
  [`${unknown}; population 84,000`, 'population-and-form', 'population 84,000'],
  [`${tried}; population 84,000`, 'population-and-form', 'population 84,000'],
  [`${cases}; coverage: no helmet 38% (30% CI 34 to 42)`, 'level-out-of-range', '38% (30% CI 34 to 42)'],
  [`${cases}; coverage: no helmet 38% (34 to 42); exact`, 'exact-and-form', '38% (34 to 42)'],
  [`${cases}; coverage: helmet from 20% to 60%; exact; level 90%`, 'exact-and-form', 'from 20% to 60%'],
  [`${cases}; coverage: helmet from 38% to 38%`, 'growth-without-change', 'from 38% to 38%'],
  [`${cases}; coverage: helmet from 0% to 0%`, 'growth-at-one-end', 'from 0% to 0%'],
  [`${cases}; coverage: helmet from 20% to 160%`, 'share-above-one', 'from 20% to 160%'],
  [`${cases}; coverage: helmet 55-65%, no helmet 30-45%`, 'coverage-two-forms', 'helmet 55-65%'],
  [`${cases}; coverage: helmet 310 of 500, no helmet 38%`, 'coverage-two-forms', 'helmet 310 of 500'],
  ['cases: a 10, b 5, d 3; coverage: a 10-20%, b 30%', 'coverage-form-of-several', '10-20%'],
  ['cases: a 10, b 5, d 3; coverage: a 20%, b 30%; try 10%, 20%', 'coverage-form-of-several', 'try 10%, 20%'],
  [
    'helmet: 31 of 55; coverage by month: Jan 20%, Feb 30%',
    'periods-without-cases',
    'coverage by month: Jan 20%, Feb 30%',
  ],
  ['helmet: 31 of 55; cases by month: 30, 25', 'periods-without-coverage', 'cases by month: 30, 25'],
  [
    'helmet: 31 of 55; coverage by month: Jan 20%, Feb; cases by month: 30, 25',
    'periods-unequal',
    'cases by month: 30, 25',
  ],
  [
    'helmet: 31 of 55; coverage by month: Jan high, Feb 20%; cases by month: 30, 25',
    'periods-unread',
    'Jan high',
  ],
  [
    'helmet: 31 of 55; coverage by month: Jan 20%, Feb 30%; cases by month: 30, 15, 10',
    'periods-unequal',
    'cases by month: 30, 15, 10',
  ],
  [
    'helmet: 31 of 55; coverage by month: Jan 20%, Feb 30%; cases by month: Jan 30, Mar 25',
    'period-names',
    'Mar 25',
  ],
  [
    'helmet: 31 of 75; coverage by month: Jan 20%, Feb 30%; cases by month: 30, 25',
    'periods-do-not-add-up',
    'Jan 20%, Feb 30%',
  ],
  ['helmet: 31 of 55; coverage by month: Jan 0%, Feb 30%; cases by month: 30, 25', 'period-at-end', '0%'],
  ['helmet: 31 of 55; coverage by month: Jan 20%, Feb 30%; cases by month: 30.5, 24.5', 'not-whole', '30.5'],
  [
    'helmet: 58.7% of cases; coverage by month: Jan 20%, Feb 30%; cases by month: 30, 25',
    'periods-need-counts',
    'Jan 20%, Feb 30%',
  ],
  ['no helmet: 44 of 75 injured, 38% of riders; unknown 12', 'unknown-not-counted', 'unknown 12'],
  [
    'cases: no helmet 50%, helmet 40%, unknown 10%; coverage: no helmet 38%',
    'unknown-not-counted',
    'unknown 10%',
  ],
  ['18 of 1,204 vs 9 of 2,377; try 30%, 38%', 'try-without-coverage', 'try 30%, 38%'],
  [`${cases}; coverage: no helmet 38%; try 0%, 38%`, 'coverage-at-end', 'try 0%, 38%'],
  [
    `${cases}; coverage: no helmet 38%; try 1%, 2%, 3%, 4%, 5%, 6%, 7%`,
    'too-many-tried',
    'try 1%, 2%, 3%, 4%, 5%, 6%, 7%',
  ],
  [`${cases}; coverage: no helmet 38%; try`, 'clause-without-value', 'try'],
];
