/**
 * Herbicide sites of action by WSSA group (the same number as HRAC 2020), by common name. From memory of the published group
 * tables; flumioxazin, fomesafen and saflufenacil 14, imazethapyr 2, metolachlor 15 read in the Iowa State 2015 Herbicide Guide.
 */
const ACTIVES_BY_GROUP: Readonly<Record<number, readonly string[]>> = {
  1: ['clethodim', 'sethoxydim', 'quizalofop', 'fluazifop', 'fenoxaprop'],
  2: ['imazethapyr', 'imazaquin', 'imazamox', 'chlorimuron', 'thifensulfuron', 'cloransulam', 'flumetsulam'],
  3: ['trifluralin', 'pendimethalin', 'ethalfluralin'],
  4: ['2,4-d', 'dicamba', '2,4-db', 'halauxifen'],
  5: ['metribuzin'],
  6: ['bentazon'],
  9: ['glyphosate'],
  10: ['glufosinate'],
  13: ['clomazone'],
  14: ['fomesafen', 'lactofen', 'acifluorfen', 'flumioxazin', 'sulfentrazone', 'saflufenacil', 'flumiclorac', 'fluthiacet'],
  15: ['metolachlor', 's-metolachlor', 'acetochlor', 'dimethenamid-p', 'dimethenamid', 'pyroxasulfone'],
  22: ['paraquat'],
  27: ['isoxaflutole', 'mesotrione'],
};

const GROUP_BY_ACTIVE = new Map(
  Object.entries(ACTIVES_BY_GROUP).flatMap(([group, actives]) => actives.map((active) => [active, Number(group)] as const)),
);

/** Groups that kill grasses only. */
const GRASS_ONLY = [1];

/** Group of an active by common name (any case; `choline` and the like after it do not matter), or `null` when unknown. */
export function groupOf(active: string): number | null {
  const name = active.trim().toLowerCase();
  return GROUP_BY_ACTIVE.get(name) ?? GROUP_BY_ACTIVE.get(name.split(/\s+/)[0] ?? '') ?? null;
}

export interface SitesOfAction {
  /** Distinct groups, ascending. */
  groups: number[];
  /** Distinct groups that work on broadleaf weeds and are not in `resistantGroups`. */
  effectiveOnBroadleaf: number[];
  /** Names that the table does not hold. */
  unknown: string[];
}

/** Count the sites of action in a programme; `resistantGroups` are those the weeds at hand withstand. */
export function sitesOfAction(actives: readonly string[], resistantGroups: readonly number[] = []): SitesOfAction {
  const groups = new Set<number>();
  const unknown: string[] = [];
  for (const active of actives) {
    const group = groupOf(active);
    if (group === null) unknown.push(active);
    else groups.add(group);
  }
  const sorted = [...groups].sort((a, b) => a - b);
  return {
    groups: sorted,
    effectiveOnBroadleaf: sorted.filter((group) => !GRASS_ONLY.includes(group) && !resistantGroups.includes(group)),
    unknown,
  };
}
