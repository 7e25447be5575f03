/**
 * The plan as an ISO 11783-10 task file (version 4.3): customer, farms, partfields with their boundaries, one product a
 * variety, one planned task a field with its rate. Element and attribute letters after ISO 11783-10:2015 Annex D; the rate
 * is DDI 11 of ISO 11783-11, "Setpoint Count Per Area Application Rate", in 0.001 seeds per square metre (both from memory).
 */
import type { MultiPolygon, Polygon, Position } from 'geojson';
import { SQUARE_METERS_PER_ACRE } from '@/lib/units';
import { lineName, type PlanView } from '../model';
import { zipOf } from './zip';

const SETPOINT_COUNT_PER_AREA = '000B';

function escapeXml(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
}

function element(name: string, attributes: Record<string, string | number | undefined>, children: string[] = []): string {
  const written = Object.entries(attributes)
    .filter(([, value]) => value !== undefined)
    .map(([key, value]) => ` ${key}="${escapeXml(String(value))}"`)
    .join('');
  return children.length === 0 ? `<${name}${written}/>` : `<${name}${written}>${children.join('')}</${name}>`;
}

/** Designators hold at most 32 characters. */
function designator(text: string): string {
  return text.slice(0, 32);
}

/** TASKDATA.XML as text. */
export function taskDataXml(view: PlanView, version: string): string {
  const lines = view.lines.filter((line) => line.variety !== null);
  const farms = [...new Set(lines.map((line) => line.farmName ?? view.operationName))];
  const codes = [...new Set(lines.map((line) => line.variety?.code as string))];
  const farmId = (name: string | null) => `FRM${farms.indexOf(name ?? view.operationName) + 1}`;
  const productId = (code: string) => `PDT${codes.indexOf(code) + 1}`;
  const parts = [
    element('CTR', { A: 'CTR1', B: designator(view.operationName) }),
    ...farms.map((farm) => element('FRM', { A: farmId(farm), B: designator(farm), I: 'CTR1' })),
    element('VPN', { A: 'VPN1', B: 0, C: 0.001, D: 1, E: 'seeds/m2' }),
    ...codes.map((code) => element('PDT', { A: productId(code), B: designator(code) })),
    ...lines.map((line, i) =>
      element(
        'PFD',
        {
          A: `PFD${i + 1}`,
          C: designator(lineName(line)),
          D: Math.round(line.areaAcres * SQUARE_METERS_PER_ACRE),
          E: 'CTR1',
          F: farmId(line.farmName),
        },
        polygons(line.geometry),
      ),
    ),
    ...lines.map((line, i) => {
      const rate = line.populationSeedsPerAcre;
      const zone =
        rate === null
          ? []
          : [
              element('TZN', { A: 1, B: 'whole field' }, [
                element('PDV', {
                  A: SETPOINT_COUNT_PER_AREA,
                  B: Math.round((rate / SQUARE_METERS_PER_ACRE) * 1000),
                  C: productId(line.variety?.code as string),
                  E: 'VPN1',
                }),
              ]),
            ];
      return element(
        'TSK',
        {
          A: `TSK${i + 1}`,
          B: designator(`Plant ${lineName(line)}`),
          C: 'CTR1',
          D: farmId(line.farmName),
          E: `PFD${i + 1}`,
          // 1: planned.
          G: 1,
          ...(rate === null ? {} : { H: 1 }),
        },
        zone,
      );
    }),
  ];
  const root = element(
    'ISO11783_TaskData',
    {
      VersionMajor: 4,
      VersionMinor: 3,
      ManagementSoftwareManufacturer: 'Hilum',
      ManagementSoftwareVersion: version,
      DataTransferOrigin: 1,
    },
    parts,
  );
  return `<?xml version="1.0" encoding="UTF-8"?>\n${root}\n`;
}

/** Partfield boundaries: polygon type 1; rings exterior (1) and interior (2), north in C and east in D. */
function polygons(geometry: Polygon | MultiPolygon): string[] {
  const all = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  return all.map((rings) =>
    element(
      'PLN',
      { A: 1 },
      rings.map((ring, index) => element('LSG', { A: index === 0 ? 1 : 2 }, ring.map(point))),
    ),
  );
}

function point([longitude, latitude]: Position): string {
  return element('PNT', { A: 2, C: (latitude as number).toFixed(9), D: (longitude as number).toFixed(9) });
}

/** The task file as terminals expect it: TASKDATA/TASKDATA.XML in a zip. */
export function planIsoxml(view: PlanView): Uint8Array {
  return zipOf([{ name: 'TASKDATA/TASKDATA.XML', bytes: new TextEncoder().encode(taskDataXml(view, '1')) }]);
}
