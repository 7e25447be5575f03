import { describe, expect, test } from 'vitest';
import { coefficients } from '@/features/placement/engine/coefficients';
import { compaction } from '@/features/placement/engine/factors/compaction';
import { drought } from '@/features/placement/engine/factors/drought';
import { soilPh } from '@/features/placement/engine/factors/soil-ph';
import { geneSpares, wetFeet } from '@/features/placement/engine/factors/wet-feet';
import type { FieldProfile, VarietyProfile } from '@/features/placement/engine/model';
import { siteOf } from '@/features/placement/engine/site';
import { aField, allAtPh, anUnknownField, aSeason, aVariety, drained, someRules } from '@/tests/support/profiles';

const on = (field: FieldProfile, variety: Partial<VarietyProfile> = {}) => ({
  site: siteOf(field, aSeason(), someRules()),
  variety: aVariety(variety),
});

describe('soil pH', () => {
  test('sour ground is wholly the field’s: no variety buys it back', () => {
    const kept = soilPh.kept(on(aField({ phShares: allAtPh(5.5) })));
    expect(kept.field.mid).toBeCloseTo(0.88, 9);
    expect(kept.match.mid).toBe(1);
    expect(kept.reason).toBe('100 % of the field below pH 6.0');
    expect(kept.detail).toContain('P, Ca, Mg and Mo');
  });

  test('the loss is weighed by area, not taken from the average pH', () => {
    const halves = [
      { value: 5, share: 0.5 },
      { value: 7.8, share: 0.5 },
    ];
    expect(soilPh.kept(on(aField({ phShares: halves }))).field.mid).toBeLessThan(0.87);
    expect(soilPh.kept(on(aField({ phShares: allAtPh(6.4) }))).field.mid).toBe(1);
  });

  test('chlorosis comes from the alkaline part alone and goes by the rating', () => {
    const calcareous = { carbonatePercent: 8, electricalConductivity: 1.2, ironChlorosisHistory: true };
    const alkaline = aField({ phShares: allAtPh(7.8), ...calcareous });
    expect(soilPh.kept(on(alkaline, { ironChlorosis: 9 })).match.mid).toBe(1);
    expect(soilPh.kept(on(alkaline, { ironChlorosis: 3 })).match.mid).toBeLessThan(0.7);
    expect(soilPh.kept(on(aField({ phShares: allAtPh(7.2), ...calcareous }), { ironChlorosis: 1 })).match.mid).toBe(1);
    expect(soilPh.kept(on(alkaline)).detail).toContain('P, B, Fe, Mn and Zn');
  });

  test('an untested field is charged a usual spread, and asked', () => {
    const kept = soilPh.kept(on(anUnknownField()));
    expect(kept.field.mid).toBeLessThan(1);
    expect(kept.field.low).toBeLessThan(kept.field.mid);
    expect(kept.reason).toBe('pH not tested');
    expect(kept.asks.map((one) => one.fact)).toContain('phShares');
  });

  test('alkaline ground without carbonate and salts tested asks for them', () => {
    const field = aField({ phShares: allAtPh(7.8), carbonatePercent: null, electricalConductivity: null });
    expect(soilPh.kept(on(field)).asks.map((one) => one.fact)).toEqual(['carbonatePercent']);
    expect(soilPh.kept(on({ ...field, carbonatePercent: 3 })).asks.map((one) => one.fact)).toEqual(['electricalConductivity']);
  });
});

describe('wet feet', () => {
  test('the reason tells the share, the class and the tile', () => {
    const shares: FieldProfile['drainageShares'] = [
      { class: 'somewhat poorly', share: 0.38 },
      { class: 'well', share: 0.62 },
    ];
    const kept = wetFeet.kept(
      on(aField({ drainageShares: shares, tiled: true }), { phytophthora: 5, phytophthoraGenes: ['1k'] }),
    );
    expect(kept.reason).toBe('38 % somewhat poorly drained, tiled');
    expect(kept.detail).toBe('Phytophthora field tolerance 5 of 9, Rps1k; treated seed');
  });

  test('tile eases the loss and does not erase it', () => {
    const loss = (tiled: boolean) => 1 - wetFeet.kept(on(aField({ drainageShares: drained('poorly'), tiled }))).kept.mid;
    expect(loss(true)).toBeLessThan(loss(false) / 1.5);
    expect(loss(true)).toBeGreaterThan(0.02);
  });

  test('unknown tile lies between tiled and not, and asks', () => {
    const kept = (tiled: boolean | null) => wetFeet.kept(on(aField({ drainageShares: drained('poorly'), tiled })));
    expect(kept(null).kept.mid).toBeLessThan(kept(true).kept.mid);
    expect(kept(null).kept.mid).toBeGreaterThan(kept(false).kept.mid);
    expect(kept(null).asks.map((one) => one.fact)).toEqual(['tiled']);
  });

  test('seed treatment and a useful gene each take pressure away', () => {
    const kept = (seedTreated: boolean, genes: string[]) =>
      wetFeet.kept(
        on(aField({ drainageShares: drained('poorly'), tiled: false, seedTreated }), {
          phytophthora: 3,
          phytophthoraGenes: genes,
        }),
      ).match.mid;
    expect(kept(true, [])).toBeGreaterThan(kept(false, []));
    expect(kept(false, ['3a'])).toBeGreaterThan(kept(false, ['1a']));
  });

  test('genes are read with or without their Rps, and the best one counts', () => {
    const c = coefficients();
    expect(geneSpares(['Rps3a'], c)).toBe(geneSpares(['3a'], c));
    expect(geneSpares(['1c', '3a'], c)).toBe(c.usefulGeneSpares);
    expect(geneSpares([], c)).toBe(0);
  });

  test('a tight layer makes wet ground worse', () => {
    const kept = (probeDepthInches: number) =>
      wetFeet.kept(on(aField({ drainageShares: drained('poorly'), probeDepthInches }))).match.mid;
    expect(kept(5)).toBeLessThan(kept(12));
  });
});

describe('compaction', () => {
  test('is wholly the field’s', () => {
    const kept = compaction.kept(on(aField({ probeDepthInches: 6 })));
    expect(kept.match.mid).toBe(1);
    expect(kept.reason).toBe('tight layer: a probe stops at 6 in');
  });

  test('of a probe and a penetrometer the worse reading counts', () => {
    const kept = compaction.kept(on(aField({ probeDepthInches: 12, penetrometerPsi: 380 })));
    expect(kept.reason).toBe('tight layer: 380 psi in the top 15 in');
    expect(kept.kept.mid).toBeLessThan(1);
  });

  test('water masks it: less is lost under irrigation', () => {
    const kept = (irrigated: boolean) => compaction.kept(on(aField({ probeDepthInches: 6, irrigated }))).kept.mid;
    expect(kept(true)).toBeGreaterThan(kept(false));
  });

  test('a field nobody has probed carries a small loss, a band and the question', () => {
    const kept = compaction.kept(on(anUnknownField()));
    expect(kept.kept.mid).toBeLessThan(1);
    expect(kept.asks[0]?.fact).toBe('probeDepthInches');
    expect(kept.asks[0]?.logDeviation).toBeGreaterThan(0);
  });
});

describe('drought', () => {
  test('grows as the soil stores less, and irrigation takes nearly all of it away', () => {
    const loss = (availableWaterInches: number, irrigated = false) =>
      1 - drought.kept(on(aField({ availableWaterInches, irrigated }))).kept.mid;
    expect(loss(4)).toBeGreaterThan(3 * loss(8));
    expect(loss(4, true)).toBeLessThan(loss(4) / 5);
  });

  test('on droughty ground a variety earlier than the optimum loses more', () => {
    const field = aField({ availableWaterInches: 4 });
    const kept = (relativeMaturity: number) => drought.kept(on(field, { relativeMaturity })).match.mid;
    expect(kept(1.5)).toBeLessThan(kept(2.5));
  });
});
