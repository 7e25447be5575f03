import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { limeRecommendation, northCarolinaAcidity, northCarolinaTons, targetPhOf, triStateTons } from '@/features/soil/lime';
import {
  effectiveCalciumCarbonateEquivalent,
  effectiveNeutralizingPower,
  effectiveNeutralizingValue,
  iowaFineness,
  LIME_POUNDS_PER_POUND_OF_NITROGEN,
  michiganMaterialTons,
  ohioFinenessIndex,
  pennsylvaniaMaterialRate,
  tonsByEffectiveNeutralizingPower,
  tonsByEffectiveNeutralizingValue,
} from '@/features/soil/lime-material';

describe('lime rates', () => {
  test('NCDA&CS: acidity 1.2 from pH 5.0 to 6.0 takes 0.75 ton (the source prints 0.76)', () => {
    expect(northCarolinaTons(1.2, 5, 6)).toBeCloseTo(0.75, 9);
  });

  test('NCDA&CS: a buffer pH of 6.2 is 1.6 meq of acidity', () => expect(northCarolinaAcidity(6.2)).toBeCloseTo(1.6, 9));

  /** Tri-State E-2567 (1995), from memory. */
  test.each([
    [65, 6.8, 4.45],
    [65, 6.5, 3.85],
    [65, 6.0, 3.15],
    [68, 6.8, 1.36],
    [68, 6.5, 1.24],
    [68, 6.0, 1.02],
  ])('Tri-State: lime test index %s to pH %s takes %s tons', (index, target, tons) => {
    expect(triStateTons(index, target)).toBeCloseTo(tons, 9);
  });

  test.each([6.0, 6.5, 6.8])('Tri-State: lime test index 70 to pH %s takes next to nothing', (target) => {
    expect(triStateTons(70, target)).toBeLessThan(0.7);
    expect(triStateTons(71, target)).toBeLessThanOrEqual(0);
  });

  test('in Ohio an SMP or Sikora buffer gives the Tri-State rate, a Mehlich one none, with words', () => {
    const ohio = { state: 'OH', ph: 5.6, targetPh: 6.5, bufferPh: 6.5 };
    expect(limeRecommendation({ ...ohio, bufferMethod: 'SMP' }).tonsPerAcre).toBeCloseTo(3.85, 9);
    expect(limeRecommendation({ ...ohio, bufferMethod: 'Sikora' }).tonsPerAcre).toBeCloseTo(3.85, 9);
    expect(limeRecommendation({ ...ohio, bufferMethod: 'Mehlich' })).toMatchObject({ tonsPerAcre: null });
    expect(limeRecommendation({ ...ohio, bufferMethod: null }).note).toContain('not named');
    expect(limeRecommendation({ ...ohio, bufferPh: null, bufferMethod: 'SMP' }).note).toContain('not tested');
  });

  test('Michigan State University Extension: none above lime index 70', () => {
    expect(limeRecommendation({ state: 'MI', ph: 6.2, targetPh: 6.5, bufferPh: 7.05, bufferMethod: 'SMP' }).tonsPerAcre).toBe(0);
  });

  test('at or above the target no lime is needed, in any state', () => {
    for (const state of ['OH', 'IA', null]) {
      expect(limeRecommendation({ state, ph: 6.5, targetPh: 6.5, bufferPh: null, bufferMethod: null }).tonsPerAcre).toBe(0);
    }
  });

  test('a state without an equation here gives words, not a number', () => {
    const iowa = limeRecommendation({ state: 'IA', ph: 5.5, targetPh: null, bufferPh: 6.4, bufferMethod: 'SMP' });
    expect(iowa.tonsPerAcre).toBeNull();
    expect(iowa.note).toContain('IA');
  });

  test('a lower buffer pH never asks for less lime', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 5.5, max: 7, noNaN: true }),
        fc.double({ min: 6, max: 6.8, noNaN: true }),
        (buffer, target) => {
          expect(triStateTons(10 * buffer - 1, target)).toBeGreaterThanOrEqual(triStateTons(10 * buffer, target));
          // The three printed lines cross near index 69, where rates are small: there a higher target may ask for a hair less.
          expect(triStateTons(10 * buffer, target + 0.05)).toBeGreaterThanOrEqual(triStateTons(10 * buffer, target) - 0.02);
        },
      ),
    );
  });
});

describe('target pH for soybeans', () => {
  test.each([
    ['MI', 6.5],
    ['WI', 6.3],
    ['IA', 6.5],
    ['NC', 6.0],
  ])('%s limes to %s (state extension bulletins, named beside the figures)', (state, ph) => {
    expect(targetPhOf(state).ph).toBe(ph);
  });

  test('Tri-State limes organic soil to 5.3, Wisconsin to 5.6 (from memory)', () => {
    expect(targetPhOf('OH', 35).ph).toBe(5.3);
    expect(targetPhOf('WI', 35).ph).toBe(5.6);
  });

  test('elsewhere it is 6.5 (common practice, no source)', () => expect(targetPhOf('KS').ph).toBe(6.5));
});

describe('the grower’s own material', () => {
  test('Penn State: 5 lb at a calcium carbonate equivalent of 70 is 7.14 lb', () => {
    expect(pennsylvaniaMaterialRate(5, 70)).toBeCloseTo(7.14, 2);
  });

  test('Michigan State University: 3.0 tons at a neutralising value of 75 is 3.6, and at 90 stays 3.0', () => {
    expect(michiganMaterialTons(3, 75)).toBeCloseTo(3.6, 9);
    expect(michiganMaterialTons(3, 90)).toBe(3);
  });

  test('Ohio (from memory): TNP 90, 95/75/50 through 8/20/60 mesh, 5 % moisture: fineness 69, ENP 1,179.9 lb, 2 tons are 3.39', () => {
    const material = { neutralizingPowerPercent: 90, pass8: 95, pass20: 75, pass60: 50, moisturePercent: 5 };
    expect(ohioFinenessIndex(material)).toBeCloseTo(69, 9);
    expect(effectiveNeutralizingPower(material)).toBeCloseTo(1179.9, 1);
    expect(tonsByEffectiveNeutralizingPower(2, effectiveNeutralizingPower(material))).toBeCloseTo(3.39, 2);
  });

  test('Iowa (from memory): CCE 90, 100/95/50 through 4/8/60 mesh, 2 % moisture: fineness 68.5, ECCE 1,208 lb', () => {
    const material = { calciumCarbonateEquivalentPercent: 90, pass4: 100, pass8: 95, pass60: 50, moisturePercent: 2 };
    expect(iowaFineness(material)).toBeCloseTo(68.5, 9);
    expect(effectiveCalciumCarbonateEquivalent(material)).toBeCloseTo(1208, 0);
  });

  test('Illinois (from memory): CCE 86.88 with 13.1/40.4/14.9/31.6: value 41.5, so 3.0 tons become 3.35', () => {
    const material = { calciumCarbonateEquivalentPercent: 86.88, over8: 13.1, from8To30: 40.4, from30To60: 14.9, under60: 31.6 };
    const value = effectiveNeutralizingValue(material, 1);
    expect(value).toBeCloseTo(41.5, 1);
    expect(tonsByEffectiveNeutralizingValue(1, value, 1)).toBeCloseTo(1.12, 2);
    expect(tonsByEffectiveNeutralizingValue(3, value, 1)).toBeCloseTo(3.35, 2);
    expect(effectiveNeutralizingValue(material, 4)).toBeGreaterThan(value);
  });

  test('a pound of nitrogen as ammonium sulfate takes 7 lb of aglime, as urea 4 (Sawyer, Iowa State University)', () => {
    expect(LIME_POUNDS_PER_POUND_OF_NITROGEN['ammonium sulfate']).toBe(7);
    expect(LIME_POUNDS_PER_POUND_OF_NITROGEN.urea).toBe(4);
  });
});
