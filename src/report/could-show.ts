import type { GroupedQuestion } from '../../grammar/question.ts';
import { detectableRiskRatio, detectableShareRatio } from '../stats/detectable-ratio.ts';
import { casesNeeded, growthNeeded } from '../stats/size-needed.ts';
import { shownDirection } from './report.ts';
import type { Reading } from './reading.ts';
import type { CouldShow, GroupedReport } from './report.ts';

/** How often a ratio has to show for it to count as one that would have been seen: four times in five (common practice). */
const power = 0.8;

/** Could it have been seen? `null` where the figures show a difference, or where nothing can be said about their size. */
export function couldShow(report: GroupedReport, ratio: Reading | undefined): CouldShow | null {
  const { question, level } = report;
  if (ratio?.interval == null || ratio.against === null || question.groups.length !== 2) return null;
  if (shownDirection(report, ratio) !== 'none-shown') return null;
  return sizesOf(question, ratio.of, ratio.against, level);
}

function sizesOf(question: GroupedQuestion, of: number, against: number, level: number): CouldShow | null {
  const effect = question.clauses.designEffect?.value ?? 1;
  switch (question.kind) {
    case 'counts': {
      const [own, other] = [question.groups[of], question.groups[against]];
      if (own === undefined || other === undefined || question.chosenByOutcome) return null;
      const [x, n] = [own.cases.value + other.cases.value, own.total.value + other.total.value];
      // Where the reference has no case, the risk of both together is the best that is known.
      const referenceRisk = other.cases.value > 0 ? other.cases.value / other.total.value : x / n;
      if (!(referenceRisk > 0 && referenceRisk < 1)) return null;
      const groups = {
        total: own.total.value / effect,
        referenceTotal: other.total.value / effect,
        referenceRisk,
      };
      return {
        ...detectableRiskRatio(groups, level, power),
        growthForDoubling: growthNeeded(groups, 2, level, power),
      };
    }
    case 'rates': {
      const [own, other] = [question.groups[of], question.groups[against]];
      if (own === undefined || other === undefined) return null;
      const all = (own.cases.value + other.cases.value) / effect;
      return ofCases(all, own.exposure.value / (own.exposure.value + other.exposure.value), level);
    }
    case 'shares': {
      const [own, other] = [question.groups[of], question.groups[against]];
      if (own?.cases == null || other?.cases == null || own.known.kind !== 'given') return null;
      if (question.clauses.population !== null || question.unknownCases != null) return null;
      return ofCases((own.cases.value + other.cases.value) / effect, own.coverage.value, level);
    }
    case 'bare-counts': {
      const [own, other] = [question.groups[of], question.groups[against]];
      if (own === undefined || other === undefined) return null;
      return ofCases((own.cases.value + other.cases.value) / effect, 0.5, level);
    }
    case 'stated':
    case 'strata':
      return null;
  }
}

function ofCases(all: number, coverage: number, level: number): CouldShow | null {
  if (all < 1) return null;
  return {
    ...detectableShareRatio(all, coverage, level, power),
    growthForDoubling: casesNeeded(coverage, 2, level, power) / all,
  };
}
