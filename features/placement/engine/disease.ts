/** Diseases are one rule with different pressures: what the field and season bring, met by the variety's rating. */
import { answer, type Factor, type FactorContext } from './factor';
import type { AskedQuestion, FactorId, FieldProfile, Rating, VarietyProfile } from './model';
import { rootSumSquares } from './numbers';
import { felt, ratedLoss } from './rated';
import type { Site } from './site';
import { ask, ratingWords } from './words';

/** What a field brings to a disease: loss of a variety rated 1 as a fraction of yield. */
export interface DiseasePressure {
  loss: number;
  /** Spread of that loss from what is unknown of the field. */
  unknownDeviation: number;
  /** Why, the number first. */
  words: string;
  /** Questions with the deviation of the loss, at rating 1, that hangs on each. */
  asks: AskedQuestion[];
}

export interface Disease {
  id: FactorId;
  label: string;
  color: string;
  trait: keyof VarietyProfile & ('suddenDeath' | 'brownStemRot' | 'whiteMould' | 'frogeye' | 'stemCanker' | 'charcoalRot');
  traitWords: string;
  needs: readonly (keyof FieldProfile | keyof VarietyProfile)[];
  source: string;
  pressure(site: Site): DiseasePressure;
  /** What of the variety besides its rating eases or raises it; 1 leaves it. */
  plant?(context: FactorContext): number;
}

/** Turn a disease into a factor. The field brings the pressure, but a rating of 9 loses nothing: all of it is match. */
export function diseaseFactor(disease: Disease): Factor {
  const { id, label, color, trait, traitWords, source } = disease;
  return {
    id,
    label,
    color,
    needs: [...disease.needs, trait],
    kept(context) {
      const { site, variety } = context;
      const pressure = site.once(id, disease.pressure);
      const plant = disease.plant?.(context) ?? 1;
      const rating: Rating = variety[trait];
      const loss = ratedLoss(site.c, {
        pressure: Math.min(0.6, pressure.loss * plant),
        deviation: rootSumSquares(pressure.unknownDeviation, site.c.diseaseUncertainty * pressure.loss) * plant,
        rating,
        trait,
        traitWords,
      });
      return answer({
        match: loss.match,
        sharedSlope: loss.sharedSlope,
        ownDeviation: loss.ownDeviation,
        reason: `${pressure.words}: ${ratingWords('rating', rating)}`,
        source,
        asks: [...loss.asks, ...felt(pressure.asks, rating, loss.match)],
      });
    },
  };
}

export interface History {
  loss: number;
  deviation: number;
  asks: AskedQuestion[];
  words: string;
}

/**
 * Loss with and without a history of the disease in the field. Unknown: the chance that it has one, and the question.
 * `chance` is a planning figure given by the disease.
 */
export function byHistory(
  known: boolean | null,
  chance: number,
  losses: { without: number; with: number },
  question: { fact: keyof FieldProfile; words: string },
): History {
  if (known !== null) {
    return {
      loss: known ? losses.with : losses.without,
      deviation: 0,
      asks: [],
      words: known ? 'seen here before' : 'never seen here',
    };
  }
  const deviation = Math.sqrt(chance * (1 - chance)) * Math.abs(losses.with - losses.without);
  return {
    loss: chance * losses.with + (1 - chance) * losses.without,
    deviation,
    asks: [ask(question.fact, question.words, deviation)],
    words: 'history unknown',
  };
}

/** 1 south of the southern latitude, fading straight to `least` at the northern one. */
export function southness(latitude: number, southern: number, northern: number, least: number): number {
  const t = (northern - latitude) / (northern - southern);
  return Math.max(least, Math.min(1, t));
}
