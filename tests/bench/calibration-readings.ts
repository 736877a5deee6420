import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { exactRateRatioInterval, rateRatioInterval } from '../../src/stats/rate-ratio.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { exactShareRatioInterval, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';
import {
  level,
  oneGroupCells,
  rateCells,
  shareCells,
  summary,
  twoGroupCells,
  wellFilled,
} from './calibration-grid.ts';
import type { Calibration, Cell } from './calibration-grid.ts';
import {
  agrestiCaffoRiskDifference,
  agrestiCoullRisk,
  logRatio,
  logRatioWithHalves,
  logRiskRatio,
  logRiskRatioWithHalves,
  newcombeRiskDifference,
  waldRisk,
  waldRiskDifference,
  woolfOddsRatio,
  woolfOddsRatioWithHalves,
} from './calibration-textbook.ts';

const riskRatio = (risk: number, reference: number) => risk / reference;
const riskDifference = (risk: number, reference: number) => risk - reference;
const oddsRatio = (risk: number, reference: number) => (risk * (1 - reference)) / (reference * (1 - risk));
const pairOf = (cases: number, referenceCases: number, coverage: number) => ({
  cases,
  referenceCases,
  coverage,
  referenceCoverage: 1 - coverage,
});
const ratesOf = (cases: number, referenceCases: number) => ({
  cases,
  exposure: 1,
  referenceCases,
  referenceExposure: 1,
});

/** The intervals that answers show, by reading; `exact` ones only on request. */
const inUse = {
  'risk ratio, Miettinen-Nurminen': () =>
    twoGroupCells((groups) => riskRatioInterval(groups, level), riskRatio),
  'risk difference, Miettinen-Nurminen': () =>
    twoGroupCells((groups) => riskDifferenceInterval(groups, level), riskDifference),
  'odds ratio, Miettinen-Nurminen': () =>
    twoGroupCells((groups) => oddsRatioInterval(groups, level), oddsRatio),
  'odds ratio, exact (conditional)': () =>
    twoGroupCells((groups) => conditionalOddsRatioInterval(groups, level), oddsRatio),
  'risk, Wilson': () => oneGroupCells((cases, total) => wilsonInterval(cases, total, level)),
  'risk, exact (Clopper-Pearson)': () =>
    oneGroupCells((cases, total) => clopperPearsonInterval(cases, total, level)),
  'ratio from shares, score': () =>
    shareCells((cases, referenceCases, coverage) =>
      shareRatioInterval(pairOf(cases, referenceCases, coverage), level),
    ),
  'ratio from shares, exact': () =>
    shareCells((cases, referenceCases, coverage) =>
      exactShareRatioInterval(pairOf(cases, referenceCases, coverage), level),
    ),
  'rate ratio, score': () =>
    rateCells((cases, referenceCases) => rateRatioInterval(ratesOf(cases, referenceCases), level)),
  'rate ratio, exact': () =>
    rateCells((cases, referenceCases) => exactRateRatioInterval(ratesOf(cases, referenceCases), level)),
} satisfies Record<string, () => readonly Cell[]>;

const textbook = {
  'risk ratio, log (Katz)': () => twoGroupCells(logRiskRatio, riskRatio),
  'risk ratio, log with halves added': () => twoGroupCells(logRiskRatioWithHalves, riskRatio),
  'risk difference, Wald': () => twoGroupCells(waldRiskDifference, riskDifference),
  'risk difference, Agresti-Caffo': () => twoGroupCells(agrestiCaffoRiskDifference, riskDifference),
  'risk difference, Newcombe hybrid': () => twoGroupCells(newcombeRiskDifference, riskDifference),
  'odds ratio, Woolf': () => twoGroupCells(woolfOddsRatio, oddsRatio),
  'odds ratio, Woolf with halves added': () => twoGroupCells(woolfOddsRatioWithHalves, oddsRatio),
  'risk, Wald': () => oneGroupCells(waldRisk),
  'risk, Agresti-Coull': () => oneGroupCells(agrestiCoullRisk),
  'ratio from shares, log odds': () =>
    shareCells((cases, others, coverage) => logRatio(cases, others, (1 - coverage) / coverage)),
  'ratio from shares, log odds with halves added': () =>
    shareCells((cases, others, coverage) => logRatioWithHalves(cases, others, (1 - coverage) / coverage)),
  'rate ratio, log': () => rateCells((cases, others) => logRatio(cases, others, 1)),
  'rate ratio, log with halves added': () =>
    rateCells((cases, others) => logRatioWithHalves(cases, others, 1)),
} satisfies Record<string, () => readonly Cell[]>;

export interface Measured {
  readonly all: Calibration;
  /** Where at least three cases and three others are expected in every group. */
  readonly filled: Calibration;
}
/** Every interval by its name: what answers show first, then the textbook's. */
export function measured(): ReadonlyMap<string, Measured> {
  return new Map(
    Object.entries({ ...inUse, ...textbook }).map(([name, cellsOf]) => {
      const cells = cellsOf();
      return [name, { all: summary(cells), filled: summary(wellFilled(cells)) }];
    }),
  );
}

const inWords = ({ cells, mean, lowest, where }: Calibration) =>
  `mean ${(100 * mean).toFixed(2)}%, lowest ${(100 * lowest).toFixed(2)}% (${where}), ${cells} cells`;

/** What the program prints below its head. */
export const report = (found: ReadonlyMap<string, Measured>) =>
  [...found]
    .map(([name, { all, filled }]) => {
      const used = name in inUse ? 'in use' : 'textbook';
      return `${name} (${used})\n  all: ${inWords(all)}\n  at least 3 expected of each: ${inWords(filled)}\n`;
    })
    .join('\n');
