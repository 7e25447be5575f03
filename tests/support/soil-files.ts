import type { Polygon, Position } from 'geojson';
import { zipOf } from '@/features/plans/exports/zip';
import { dbfOf, shpOf, WGS84_PRJ } from './shapefiles';

/** Laboratory sheets, Modus files, sample points and survey areas written by the tests themselves. Everything is invented. */

export const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

export interface PointToWrite {
  longitude: number;
  latitude: number;
  attributes: Record<string, string>;
}

/** The .shp file of points (ESRI Shapefile Technical Description, July 1998). */
export function pointShpOf(points: PointToWrite[]): Buffer {
  const records = points.map(({ longitude, latitude }, index) => {
    const record = Buffer.alloc(28);
    record.writeInt32BE(index + 1, 0);
    record.writeInt32BE(10, 4);
    record.writeInt32LE(1, 8);
    record.writeDoubleLE(longitude, 12);
    record.writeDoubleLE(latitude, 20);
    return record;
  });
  const header = Buffer.alloc(100);
  header.writeInt32BE(9994, 0);
  header.writeInt32BE((100 + records.length * 28) / 2, 24);
  header.writeInt32LE(1000, 28);
  header.writeInt32LE(1, 32);
  return Buffer.concat([header, ...records]);
}

/** A sampler's points as they come: a zip with a folder inside. */
export function zippedPoints(points: PointToWrite[], prj: string | null = WGS84_PRJ): Uint8Array {
  return zipOf([
    { name: 'points/Samples.shp', bytes: pointShpOf(points) },
    { name: 'points/Samples.dbf', bytes: dbfOf(points.map((point) => point.attributes)) },
    ...(prj ? [{ name: 'points/Samples.prj', bytes: Buffer.from(prj) }] : []),
  ]);
}

/** Modus version 1 with the elements of the public schema. */
export function modusXml(
  samples: { number: string; ph: string; buffer?: string; place?: string; depthId?: string }[],
  laboratory = 'Prairie Soil Laboratory',
): string {
  const result = (element: string, value: string, unit: string, test: string) =>
    `<NutrientResult><Element>${element}</Element><Value>${value}</Value><ValueUnit>${unit}</ValueUnit><ModusTestID>${test}</ModusTestID></NutrientResult>`;
  return `<?xml version="1.0" encoding="UTF-8"?>
<ModusResult Version="1.0"><Event><EventMetaData><EventDate>2026-10-20</EventDate><EventType><Soil/></EventType></EventMetaData>
<LabMetaData><LabName>${laboratory}</LabName></LabMetaData>
<FMISMetaData><FMISProfile><Field ID="Home 80"/></FMISProfile></FMISMetaData>
<EventSamples><Soil><DepthRefs><DepthRef DepthID="1"><Name>0 - 8 in</Name><StartingDepth>0</StartingDepth><EndingDepth>8</EndingDepth><DepthUnit>in</DepthUnit></DepthRef></DepthRefs>
${samples
  .map(
    (
      sample,
    ) => `<SoilSample><SampleMetaData><SampleNumber>${sample.number}</SampleNumber><ReportID>9${sample.number}</ReportID>${sample.place ? `<Geometry><wkt>${sample.place}</wkt></Geometry>` : ''}</SampleMetaData>
<Depths><Depth DepthID="${sample.depthId ?? '1'}"><NutrientResults>${result('pH', sample.ph, 'none', 'S-PH-1:1.02.07')}${sample.buffer ? result('BpH', sample.buffer, 'none', 'S-BPH-SIK1.02') : ''}${result('OM', '3.1', '%', 'S-SOM-LOI.15')}${result('P', '34', 'ppm', 'S-P-B1-1:10.01.03')}${result('BS-Ca', '70', '%', 'S-BS-CA.19')}</NutrientResults></Depth></Depths></SoilSample>`,
  )
  .join('\n')}
</Soil></EventSamples></Event></ModusResult>`;
}

/** A row of a survey table: cells by place, the others empty. */
function barred(width: number, cells: Record<number, string | number>): string {
  return Array.from({ length: width }, (_, at) => {
    const cell = cells[at];
    return cell === undefined ? '' : typeof cell === 'number' ? String(cell) : `"${cell}"`;
  }).join('|');
}

export interface SurveyUnitToWrite {
  key: string;
  symbol: string;
  name: string;
  outline: Polygon;
  drainage: string;
  /** [top cm, bottom cm, pH, carbonate %] */
  horizons?: [number, number, number, number][];
  waterCm?: number;
  slope?: number;
}

/** A survey area as the NRCS delivers it: spatial and tabular folders, one component a map unit. */
export function surveyArea(units: SurveyUnitToWrite[], area = 'IA081'): Uint8Array {
  const folder = `${area}/`;
  const table = (rows: string[]) => Buffer.from(rows.map((row) => `${row}\r\n`).join(''));
  return zipOf([
    {
      name: `${folder}spatial/soilmu_a_${area.toLowerCase()}.shp`,
      bytes: shpOf(
        units.map((unit) => ({ geometry: unit.outline, attributes: {} })),
        WGS84_PRJ,
      ),
    },
    {
      name: `${folder}spatial/soilmu_a_${area.toLowerCase()}.dbf`,
      bytes: dbfOf(units.map((unit) => ({ AREASYMBOL: area, SPATIALVER: '1', MUSYM: unit.symbol, MUKEY: unit.key }))),
    },
    { name: `${folder}spatial/soilmu_a_${area.toLowerCase()}.prj`, bytes: Buffer.from(WGS84_PRJ) },
    {
      name: `${folder}tabular/mapunit.txt`,
      bytes: table(units.map((unit) => barred(24, { 0: unit.symbol, 1: unit.name, 23: unit.key }))),
    },
    {
      name: `${folder}tabular/muaggatt.txt`,
      bytes: table(
        units.map((unit) =>
          barred(40, {
            0: unit.symbol,
            1: unit.name,
            3: 2,
            4: unit.slope ?? 1.5,
            8: 'None',
            13: unit.waterCm ?? 20.32,
            15: unit.drainage,
            17: 'B/D',
            39: unit.key,
          }),
        ),
      ),
    },
    {
      name: `${folder}tabular/comp.txt`,
      bytes: table(
        units.map((unit) =>
          barred(109, { 1: 85, 3: unit.name, 5: 'Yes', 9: 2, 23: unit.drainage, 107: unit.key, 108: `c${unit.key}` }),
        ),
      ),
    },
    {
      name: `${folder}tabular/chorizon.txt`,
      bytes: table(
        units.flatMap((unit) =>
          (
            unit.horizons ?? [
              [0, 20, 6, 0],
              [20, 50, 7, 5],
            ]
          ).map(([top, bottom, ph, carbonate], at) =>
            barred(171, { 0: 'Ap', 6: top, 9: bottom, 114: carbonate, 135: ph, 169: `c${unit.key}`, 170: `h${unit.key}${at}` }),
          ),
        ),
      ),
    },
  ]);
}

/** A box in degrees. */
export function boxPolygon(west: number, south: number, east: number, north: number): Polygon {
  const ring: Position[] = [
    [west, south],
    [east, south],
    [east, north],
    [west, north],
    [west, south],
  ];
  return { type: 'Polygon', coordinates: [ring] };
}
