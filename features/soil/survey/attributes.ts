/** What the tables of an area say of its map units. Pure. */
import {
  DRAINAGE_CLASSES,
  type DrainageClass,
  FLOODING_FREQUENCIES,
  type FloodingFrequency,
} from '@/features/placement/engine/model';
import { groupBy } from '@/lib/group';
import { CENTIMETERS_PER_INCH } from '@/lib/units';
import type { SurveyUnit } from './model';
import { columnOrders, type SurveyTable, surveyNumber, tableRows } from './tables';
import { componentWeighted, depthWeighted, SURFACE_CM } from './weighting';

export type UnitAttributes = Omit<SurveyUnit, 'geometry' | 'areaAcres' | 'share'>;

/** "Somewhat poorly drained" → 'somewhat poorly'. */
export function drainageOf(text: string | undefined): DrainageClass | null {
  const words = (text ?? '')
    .toLowerCase()
    .replace(/\s*drained\s*$/, '')
    .trim();
  return DRAINAGE_CLASSES.find((one) => one === words) ?? null;
}

/** "Occasional" → 'occasional'. */
export function floodingOf(text: string | undefined): FloodingFrequency | null {
  const words = (text ?? '').toLowerCase().trim();
  return FLOODING_FREQUENCIES.find((one) => one === words) ?? null;
}

/** pH and carbonate of the top 30 cm of each map unit: horizons by depth, components by percent. */
function surfaceOf(
  components: Record<'comppct_r' | 'cokey' | 'mukey', string>[],
  horizons: Record<'hzdept_r' | 'hzdepb_r' | 'caco3_r' | 'ph1to1h2o_r' | 'cokey', string>[],
): Map<string, { ph: number | null; carbonate: number | null }> {
  const byComponent = groupBy(horizons, (row) => row.cokey);
  const weigh = (own: typeof components, column: 'ph1to1h2o_r' | 'caco3_r') =>
    componentWeighted(
      own.map((component) => ({
        percent: surveyNumber(component.comppct_r) ?? 0,
        value: depthWeighted(
          (byComponent.get(component.cokey) ?? []).map((row) => ({
            topCm: surveyNumber(row.hzdept_r) ?? 0,
            bottomCm: surveyNumber(row.hzdepb_r) ?? 0,
            value: surveyNumber(row[column]),
          })),
          0,
          SURFACE_CM,
        ),
      })),
    );
  return new Map(
    [...groupBy(components, (row) => row.mukey)].map(([key, own]) => [
      key,
      { ph: weigh(own, 'ph1to1h2o_r'), carbonate: weigh(own, 'caco3_r') },
    ]),
  );
}

/** Attributes of the map units asked for, by key. What an area's tables lack is `null` and said in `problems`. */
export function attributesOfUnits(
  texts: Partial<Record<SurveyTable | 'columns', string>>,
  keys: ReadonlySet<string>,
  problems: string[],
): Map<string, UnitAttributes> {
  const orders = columnOrders(texts.columns ?? null);
  const rowsOf = <Table extends SurveyTable>(table: Table, wanted: Parameters<typeof tableRows<Table>>[3]) => {
    const text = texts[table];
    if (text === undefined) problems.push(`The area has no table ${table}.txt, so what it says is unknown.`);
    return tableRows(table, text ?? '', orders, wanted);
  };
  const names = new Map(rowsOf('mapunit', (row) => keys.has(row.mukey)).map((row) => [row.mukey, row]));
  const aggregated = new Map(rowsOf('muaggatt', (row) => keys.has(row.mukey)).map((row) => [row.mukey, row]));
  const components = rowsOf('component', (row) => keys.has(row.mukey));
  const componentKeys = new Set(components.map((row) => row.cokey));
  const horizons = rowsOf('chorizon', (row) => componentKeys.has(row.cokey));
  const surface = surfaceOf(components, horizons);
  const unknown = [...keys].filter((key) => !names.has(key) && !aggregated.has(key));
  if (unknown.length > 0)
    problems.push(
      `${unknown.length} of ${keys.size} map units stand on the map and in no table: key ${unknown.slice(0, 8).join(', ')}.`,
    );
  return new Map(
    [...keys].map((key) => {
      const row = aggregated.get(key);
      const largest = components
        .filter((one) => one.mukey === key)
        .sort((one, other) => (surveyNumber(other.comppct_r) ?? 0) - (surveyNumber(one.comppct_r) ?? 0))[0];
      const waterCm = surveyNumber(row?.aws0100wta);
      return [
        key,
        {
          mapUnitKey: key,
          symbol: names.get(key)?.musym ?? '',
          name: names.get(key)?.muname ?? '',
          drainage: drainageOf(row?.drclassdcd) ?? drainageOf(largest?.drainagecl),
          hydrologicGroup: row?.hydgrpdcd || null,
          slopePercent: surveyNumber(row?.slopegradwta) ?? surveyNumber(row?.slopegraddcp) ?? surveyNumber(largest?.slope_r),
          availableWaterInches: waterCm === null ? null : waterCm / CENTIMETERS_PER_INCH,
          flooding: floodingOf(row?.flodfreqdcd),
          surfacePh: surface.get(key)?.ph ?? null,
          surfaceCarbonatePercent: surface.get(key)?.carbonate ?? null,
        },
      ];
    }),
  );
}
