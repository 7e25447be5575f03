import { describe, expect, test } from 'vitest';
import { UNKNOWN_FACTS } from '@/features/fields/model';
import { fieldProfile, type ProfiledField, type ProfiledMapUnit, type ProfiledSample } from '@/features/placement/profile';

const field: ProfiledField = {
  id: 'north',
  name: 'North',
  areaAcres: 40,
  latitude: 40.1,
  longitude: -83.1,
  elevationFt: null,
  state: 'OH',
  geometry: {
    type: 'Polygon',
    coordinates: [
      [
        [-83.102, 40.098],
        [-83.098, 40.098],
        [-83.098, 40.102],
        [-83.102, 40.102],
        [-83.102, 40.098],
      ],
    ],
  },
};

function aSample(parts: Partial<ProfiledSample> = {}): ProfiledSample {
  return {
    sampledOn: '2026-10-01',
    latitude: 40.1,
    longitude: -83.1,
    depthFromInches: 0,
    ph: 6.4,
    bufferPh: null,
    bufferMethod: null,
    organicMatterPercent: null,
    cationExchangeCapacity: null,
    carbonatePercent: null,
    electricalConductivity: null,
    cystEggsPer100cc: null,
    ...parts,
  };
}

function aMapUnit(parts: Partial<ProfiledMapUnit> = {}): ProfiledMapUnit {
  return {
    share: 1,
    drainage: 'well',
    hydrologicGroup: 'B',
    slopePercent: 2,
    availableWaterInches: 8,
    flooding: 'none',
    surfaceCarbonatePercent: null,
    ...parts,
  };
}

const base = { field, facts: UNKNOWN_FACTS, soilSamples: [], mapUnits: [] };

describe('the profile of a field', () => {
  test('of which nothing is known holds no invented fact', () => {
    const profile = fieldProfile(base);
    expect(profile).toMatchObject({
      phShares: null,
      phPointCount: 0,
      drainageShares: null,
      limeTonsPerAcre: null,
      bufferPh: null,
      rowWidthInches: null,
      weedProgramme: null,
    });
    expect(profile.yieldHistoryBushelsPerAcre).toEqual([]);
  });

  test('turns points into shares of the field that sum to 1', () => {
    const soilSamples = [5.4, 5.8, 6.3, 6.9, 7.2].map((ph, i) => aSample({ ph, longitude: -83.1018 + i * 0.0009 }));
    const profile = fieldProfile({ ...base, soilSamples });
    expect(profile.phPointCount).toBe(5);
    expect(profile.phShares!.reduce((sum, one) => sum + one.share, 0)).toBeCloseTo(1, 9);
    expect(profile.phShares![0]!.value).toBeGreaterThanOrEqual(5.4);
    expect(profile.phErrorStandardDeviation).toBeGreaterThan(0);
  });

  test('takes an average without a place as the whole field', () => {
    const profile = fieldProfile({ ...base, soilSamples: [aSample({ latitude: null, longitude: null, ph: 6.14 })] });
    expect(profile.phShares).toEqual([{ value: 6.1, share: 1 }]);
  });

  test('leaves out subsoil and tests older than four years before the newest', () => {
    const soilSamples = [aSample({ ph: 6 }), aSample({ ph: 4, depthFromInches: 8 }), aSample({ ph: 5, sampledOn: '2021-04-01' })];
    expect(fieldProfile({ ...base, soilSamples }).phShares).toEqual([{ value: 6, share: 1 }]);
  });

  test('limes the sour samples by the state’s method: in Ohio, SMP 6.5 to pH 6.5 is 3.85 tons', () => {
    const soilSamples = [aSample({ ph: 5.6, bufferPh: 6.5, bufferMethod: 'SMP' }), aSample({ ph: 6.8, longitude: -83.0985 })];
    expect(fieldProfile({ ...base, soilSamples }).limeTonsPerAcre!.tons).toBeCloseTo(3.85, 9);
    const iowa = fieldProfile({ ...base, field: { ...field, state: 'IA' }, soilSamples }).limeTonsPerAcre!;
    expect(iowa.tons).toBeNull();
    expect(iowa.method).toContain('IA');
  });

  test('a survey outweighs the drainage the grower states, and half-known surveys say nothing', () => {
    const facts = { ...UNKNOWN_FACTS, drainage: 'well' as const };
    const mapUnits = [aMapUnit({ share: 0.6, drainage: 'poorly' }), aMapUnit({ share: 0.4, drainage: 'moderately well' })];
    expect(fieldProfile({ ...base, facts, mapUnits }).drainageShares).toEqual([
      { class: 'moderately well', share: 0.4 },
      { class: 'poorly', share: 0.6 },
    ]);
    const thin = [aMapUnit({ share: 0.3, drainage: 'poorly' }), aMapUnit({ share: 0.7, drainage: null })];
    expect(fieldProfile({ ...base, facts, mapUnits: thin }).drainageShares).toEqual([{ class: 'well', share: 1 }]);
  });

  test('flooding counts once it reaches a fifth of the field', () => {
    const units = (share: number) => [aMapUnit({ share, flooding: 'frequent' }), aMapUnit({ share: 1 - share })];
    expect(fieldProfile({ ...base, mapUnits: units(0.25) }).floodingFrequency).toBe('frequent');
    expect(fieldProfile({ ...base, mapUnits: units(0.1) }).floodingFrequency).toBe('none');
  });

  test('carbonate is that of the alkaline samples', () => {
    const soilSamples = [
      aSample({ ph: 7.9, carbonatePercent: 6 }),
      aSample({ ph: 6.2, carbonatePercent: 0, longitude: -83.0985 }),
    ];
    expect(fieldProfile({ ...base, soilSamples }).carbonatePercent).toBe(6);
  });
});
