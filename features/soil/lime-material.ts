/** How much of the grower's own material a lime rate is: each state rates fineness and purity in its own way. */

/** Percent passing sieves; `moisturePercent` of the material as delivered. */
export interface OhioMaterial {
  /** Total neutralising power, percent of pure calcium carbonate. */
  neutralizingPowerPercent: number;
  pass8: number;
  pass20: number;
  pass60: number;
  moisturePercent: number;
}

/** Ohio fineness index, percent: 0.2 of what passes 8 but not 20 mesh, 0.6 of 20 to 60, all of what passes 60 (from memory). */
export function ohioFinenessIndex({ pass8, pass20, pass60 }: Pick<OhioMaterial, 'pass8' | 'pass20' | 'pass60'>): number {
  return 0.2 * (pass8 - pass20) + 0.6 * (pass20 - pass60) + pass60;
}

/** Ohio effective neutralising power, lb a ton (Ohio lime law; from memory). */
export function effectiveNeutralizingPower(material: OhioMaterial): number {
  const dry = (100 - material.moisturePercent) / 100;
  return 2000 * (material.neutralizingPowerPercent / 100) * (ohioFinenessIndex(material) / 100) * dry;
}

/** Tons of material that hold the wanted tons of effective neutralising power. */
export function tonsByEffectiveNeutralizingPower(wantedTons: number, effectivePoundsPerTon: number): number {
  return (wantedTons * 2000) / effectivePoundsPerTon;
}

export interface IowaMaterial {
  calciumCarbonateEquivalentPercent: number;
  pass4: number;
  pass8: number;
  pass60: number;
  moisturePercent: number;
}

/** Iowa fineness, percent: 0.1 of what passes 4 mesh, 0.3 of 8, 0.6 of 60 (from memory). */
export function iowaFineness({ pass4, pass8, pass60 }: Pick<IowaMaterial, 'pass4' | 'pass8' | 'pass60'>): number {
  return 0.1 * pass4 + 0.3 * pass8 + 0.6 * pass60;
}

/** Iowa effective calcium carbonate equivalent, lb a ton (from memory). */
export function effectiveCalciumCarbonateEquivalent(material: IowaMaterial): number {
  const dry = (100 - material.moisturePercent) / 100;
  return 20 * material.calciumCarbonateEquivalentPercent * (iowaFineness(material) / 100) * dry;
}

export interface IllinoisMaterial {
  calciumCarbonateEquivalentPercent: number;
  /** Percent held on 8 mesh, between 8 and 30, between 30 and 60, and passing 60; they sum to 100. */
  over8: number;
  from8To30: number;
  from30To60: number;
  under60: number;
}

/** Illinois efficiencies by size after one and four years, and the value of typical material (Illinois Agronomy Handbook; from memory). */
const ILLINOIS = {
  1: { efficiency: [0.05, 0.2, 0.5, 1], typical: 46.35 },
  4: { efficiency: [0.15, 0.45, 1, 1], typical: 67.5 },
} as const;

/** Illinois effective neutralising value after one or four years. */
export function effectiveNeutralizingValue(material: IllinoisMaterial, years: 1 | 4): number {
  const [over8, from8, from30, under60] = ILLINOIS[years].efficiency;
  const fineness =
    over8 * material.over8 + from8 * material.from8To30 + from30 * material.from30To60 + under60 * material.under60;
  return (fineness * material.calciumCarbonateEquivalentPercent) / 100;
}

/** Tons of this material for a rate given in typical Illinois material. */
export function tonsByEffectiveNeutralizingValue(tons: number, effectiveValue: number, years: 1 | 4): number {
  return (tons * ILLINOIS[years].typical) / effectiveValue;
}

/** Michigan: rate × 90 / neutralising value, only when that lies below 80 or above 100 (Michigan State University Extension). */
export function michiganMaterialTons(tons: number, neutralizingValuePercent: number): number {
  if (neutralizingValuePercent >= 80 && neutralizingValuePercent <= 100) return tons;
  return (tons * 90) / neutralizingValuePercent;
}

/** Pennsylvania: rate × 100 / calcium carbonate equivalent (Penn State Agricultural Analytical Services Laboratory). */
export function pennsylvaniaMaterialRate(rate: number, calciumCarbonateEquivalentPercent: number): number {
  return (rate * 100) / calciumCarbonateEquivalentPercent;
}

/** Pounds of aglime that undo the acidity of a pound of nitrogen (Sawyer, Iowa State University). */
export const LIME_POUNDS_PER_POUND_OF_NITROGEN = {
  'ammonium sulfate': 7,
  'ammonium phosphates': 7,
  'anhydrous ammonia': 4,
  urea: 4,
  UAN: 4,
  'ammonium nitrate': 4,
} as const;
