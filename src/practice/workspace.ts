/** The invented people and channels of the practice room. */
export interface Person {
  readonly id: string;
  readonly name: string;
  readonly work: string;
}

export interface Channel {
  readonly id: string;
  readonly name: string;
}

export const people: readonly Person[] = [
  { id: 'UADA', name: 'Ada', work: 'communications' },
  { id: 'UBEN', name: 'Ben', work: 'analyst on call' },
  { id: 'UCLEO', name: 'Cleo', work: 'newsroom' },
];

export const channels: readonly Channel[] = [
  { id: 'CFERRY', name: 'ferry desk' },
  { id: 'CTOWN', name: 'town hall press' },
];

export const botPerson: Person = { id: 'UDIVISOR', name: 'Divisor', work: 'checks figures' };
export const teamId = 'THARROWMERE';
export const botId = 'BDIVISOR';
export const appId = 'ADIVISOR';

/** Lines that the page offers to try. */
export const linesToTry: readonly string[] = [
  'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
  'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
  'harbour ferry: 31 of 9,240 (3.4%)',
  'ferry delays from 412 to 530',
  'depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days',
  'by age: under 40: night 30 of 900 vs day 200 of 9,000 | 40 and over: night 160 of 2,000 vs day 6 of 100',
  '71% of the injured vs 38% of riders',
  '18 of 12',
  'help',
];
