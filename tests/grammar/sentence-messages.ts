/** Messages as people write them, and what is offered to be asked. The town of Harrowmere is invented. */

/** Message, the line that is offered first. */
export const offered: readonly (readonly [string, string])[] = [
  // Shares of cases beside shares of everybody.
  [
    'Most of the injured, 44 of 75, wore no helmet, though only 38% of riders go without',
    'no helmet: 44 of 75 injured, 38% of riders',
  ],
  [
    '44 of the 75 people hurt werent wearing a helmet. 38% of riders dont',
    'no helmet: 44 of 75 people hurt, 38% of riders',
  ],
  [
    '44 of the 75 injured riders were not wearing a helmet. In Harrowmere 38% of riders ride without one.',
    'no helmet: 44 of 75 injured riders, 38% of riders',
  ],
  [
    'Of the 75 people hurt on the Harrowmere cycle paths, 44 wore no helmet, and only 38% of riders go without.',
    'no helmet: 44 of 75 people hurt, 38% of riders',
  ],
  [
    '75 people were injured, 44 of them without a helmet, while 38% of riders have none',
    'no helmet: 44 of 75 people, 38% of riders',
  ],
  [
    '58.7% of the injured (44 of 75) wore no helmet; 38% of riders go without',
    'no helmet: 44 of 75 injured, 38% of riders',
  ],
  [
    '71% of the injured had no helmet, only 38% of riders go without',
    'no helmet: 71% of injured, 38% of riders',
  ],
  [
    'Only 38% of riders go without a helmet, yet they are 71% of the injured',
    'no helmet: 71% of injured, 38% of riders',
  ],
  [
    'of the injured, 71% wore no helmet; of riders, 38% go without',
    'no helmet: 71% of injured, 38% of riders',
  ],
  ['Among the injured 71% had no helmet, among riders 38%', 'no helmet: 71% of injured, 38% of riders'],
  [
    'a third of incidents involve agency staff, who are 12% of the workforce',
    'agency staff: 1 in 3 of incidents, 12% of workforce',
  ],
  [
    'Half of the incidents involved agency drivers, who make up 12% of the drivers',
    'agency drivers: 1 in 2 of incidents, 12% of drivers',
  ],
  [
    'Two thirds of late ferries run at night, although night sailings are 20% of all sailings',
    'night: 2 in 3 of late ferries, 20% of sailings',
  ],
  [
    'One in four injured riders had no light, and one in ten riders has none',
    'no light: 1 in 4 of injured riders, 1 in 10 of riders',
  ],
  [
    'Helmet use is 62% among riders, but only 41% of the injured wore one',
    'Helmet use: 41% of injured, 62% of riders',
  ],
  [
    '\u201c44 of 75 injured riders wore no helmet,\u201d the mayor said, \u201cand only 38% of riders go without.\u201d',
    'no helmet: 44 of 75 injured riders, 38% of riders',
  ],
  [
    'is that right: 44 of 75 injured wore no helmet, 38% of riders go without?',
    'no helmet: 44 of 75 injured, 38% of riders',
  ],
  [
    'About 38% of riders go without helmets, but nearly 60% of the injured did',
    'no helmets: 60% of injured, 38% of riders',
  ],
  [
    'between 55% and 65% of riders wear helmets; 31 of 75 injured did',
    'helmets: 31 of 75 injured; coverage 55-65% of riders',
  ],
  // The percentage is of the others.
  [
    '44 of 75 injured riders wore no helmet, though 62% of riders wear one',
    'cases: no helmet 44, helmet 31; coverage: helmet 62% of riders',
  ],
  // Counts in two groups.
  [
    'night shifts are 4 times more dangerous, 18 incidents from 1,204 shifts compared to 9 from 2,377',
    '18 incidents of 1,204 shifts vs 9 of 2,377 shifts',
  ],
  [
    'Night shifts had 18 incidents from 1,204 shifts, day shifts 9 from 2,377',
    'Night shifts: 18 incidents of 1,204 shifts vs day shifts: 9 of 2,377 shifts',
  ],
  [
    'On night shifts there were 18 incidents in 1,204 shifts, on day shifts 9 in 2,377 shifts',
    'night shifts: 18 incidents of 1,204 shifts vs day shifts: 9 of 2,377 shifts',
  ],
  [
    'We counted 18 incidents out of 1,204 shifts at night and 9 out of 2,377 by day.',
    'night: 18 incidents of 1,204 shifts vs day: 9 of 2,377 shifts',
  ],
  [
    '18 incidents from 1,204 shifts compared to 9 from 2,377',
    '18 incidents of 1,204 shifts vs 9 of 2,377 shifts',
  ],
  ['Three of nine buses failed the test, but two of ten coaches did', 'buses: 3 of 9 vs coaches: 2 of 10'],
  ['Is "twice as likely" ok? 18/1204 v 9/2377', '18 of 1,204 vs 9 of 2,377'],
  ['can I say twice as many? 18 of 1,204 vs 9 of 2,377', '18 of 1,204 vs 9 of 2,377'],
  [
    'Of 1,204 night shifts 18 had an incident; of 2,377 day shifts 9 did',
    'night shifts: 18 of 1,204 vs day shifts: 9 of 2,377',
  ],
  [
    'Did you see that 12 of the 40 wells in the harbour ward are contaminated but only 9 of 310 in the hill ward?',
    'harbour ward: 12 of 40 wells vs hill ward: 9 of 310 wells',
  ],
  [
    'Hi all, quick check please: night shift 18 of 1,204, day shift 9 of 2,377. Thanks!',
    'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
  ],
  ['the new pump is 3 times safer: 3 of 900 vs 9 of 900', '3 of 900 vs 9 of 900'],
  // One group.
  [
    'The harbour ferry was late on 31 of 9,240 crossings (3.4%) last year',
    'harbour ferry: 31 of 9,240 crossings',
  ],
  ['The ferry desk had 18 of 1,204 sailings late in May', 'ferry desk: 18 of 1,204 sailings'],
  // Rates.
  [
    'The east line had 14 incidents in 5,200 bus-days while the west line had 9 in 8,800 bus-days',
    'east line: 14 incidents in 5,200 bus-days vs west line: 9 in 8,800 bus-days',
  ],
  // Changes.
  ['Ferry delays are up 29% from 412 to 530', 'Ferry delays from 412 to 530'],
  ['incidents fell 12% from 412 to 363', 'incidents from 412 to 363'],
  ['Complaints fell to 412 from 530', 'Complaints from 530 to 412'],
  ['Delays went up by 29%, from 412 in 2023 to 530 in 2024', '"2023": 412 Delays vs "2024": 530'],
  ['There were 530 delays this year compared with 412 last year', 'this year: 530 vs last year: 412'],
  ['in 2023 there were 412 delays and in 2024 there were 530', '"2023": 412 vs "2024": 530'],
  ['can I say delays doubled? 4.2% \u2192 8.1%', 'from 4.2% to 8.1%'],
  ['3 in 1000 to 4 in 1000 is that 33%', 'from 3 in 1,000 to 4 in 1,000'],
  ['The share of late crossings rose from 4.4% to 5.2% in May', 'from 4.4% to 5.2%'],
  [
    '530 delays, up from 412 last year; crossings went from 10,400 to 12,900',
    'delays from 412 of 10,400 to 530 of 12,900 crossings',
  ],
  // Percentages and frequencies of one thing.
  ['4.2% of night ferries were late against 2.6% of day ferries', 'night ferries: 4.2% vs day ferries: 2.6%'],
  [
    '4.2% of night sailings and 2.6% of day sailings were cancelled, the harbour office said',
    'night sailings: 4.2% vs day sailings: 2.6%',
  ],
  ['1 in 250 wells was bad last year, 1 in 400 this year', 'last year: 1 in 250 vs this year: 1 in 400'],
  ['risk of a late ferry is 1 in 250 at night and 1 in 400 by day', 'night: 1 in 250 vs day: 1 in 400'],
  // Counts without totals.
  ['18 incidents at night and 9 by day were reported', 'night: 18 vs day: 9'],
];

/** Message, what is missing, the line with the gap. */
export const incomplete: readonly (readonly [string, string, string])[] = [
  ['Most of the injured (44 of 75) wore no helmet', 'coverage', 'no helmet: 44 of 75 injured, ...% of ...'],
  ['71% of the injured had no helmet', 'coverage', 'no helmet: 71% of injured, ...% of ...'],
  [
    '44 of 75 injured riders wore no helmet, while 38% of riders are women',
    'coverage',
    'no helmet: 44 of 75 injured riders, ...% of ...',
  ],
  ['Two in three injured riders were hit at night', 'coverage', 'hit: 2 in 3 of injured riders, ...% of ...'],
  ['There were 18 incidents at night', 'total', '18 incidents of ...'],
  ['38% of riders go without a light', 'second-group', 'riders: 38% vs ...'],
];

/** A result without its figures, and the words that are it. */
export const results: readonly (readonly [string, string])[] = [
  ['RR 2.3 (95% CI 1.5-3.7)', 'RR 2.3 (95% CI 1.5-3.7)'],
  ['helmets cut head injuries by 57%', 'cut head injuries by 57%'],
  ['Wells near the tannery are twice as likely to be contaminated', 'twice as likely'],
  ['Night shifts are 4 times more dangerous', '4 times more dangerous'],
  ['Riders without lights are 1.8x more likely to be hurt', '1.8x more likely'],
  ['Delays are up 29%', 'up 29%'],
  ['The risk doubled', 'doubled'],
  ['the odds ratio was 2.3', 'odds ratio was 2.3'],
];

/** Messages in which no figure stands, numbers or not. */
export const withoutFigure: readonly string[] = [
  'who rode the ferry',
  'who checked the helmet figure',
  'The helmet figure looks wrong to me',
  'Can you check the well figures before the post goes out?',
  'helmet',
  'Ask Ada about ward 7',
  'See page 12 of the report',
  'I saw it on channel 4',
  'Call me at 5',
  'On 3 May 2024 the council met at 8:30',
  'from 2019 to 2021 the ferry did not run',
  'Is the night shift really that dangerous?',
  'most of the injured wore no helmet',
  '~44 of 75~ is the wrong figure',
];

/** Lines that are read strictly stay as they are, also where they look a little like a sentence. */
export const leftAlone: readonly (readonly [string, string])[] = [
  ['is 3/900 vs 4/800 significant', '3 of 900 vs 4 of 800'],
  ['ferry delays 412 last year 530 this year', 'last year: 412 ferry delays vs this year: 530'],
  ['risk cut by half, from 2 in 10,000 to 1 in 10,000', 'from 2 in 10,000 to 1 in 10,000'],
  [
    'patients who were late: 3 of 900 vs patients who were on time: 9 of 800',
    '"patients who were late": 3 of 900 vs "patients who were on time": 9 of 800',
  ],
  [
    '"riders that had one": 3 of 900 vs "riders that had none": 9 of 800',
    '"riders that had one": 3 of 900 vs riders that had none: 9 of 800',
  ],
  // Only the end of the sentence clung to the name.
  [
    '18 out of 1204 night staff and 9 out of 2377 day staff had an incident',
    'night staff: 18 of 1,204 vs day staff: 9 of 2,377',
  ],
];
