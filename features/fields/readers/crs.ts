import proj4 from 'proj4';
import { bad, good, type Outcome } from '@/lib/errors';

/** Coordinate systems that a person is offered when a shapefile does not say its own. */
export const OFFERED_CRS: readonly { code: string; label: string }[] = [
  { code: 'EPSG:4326', label: 'Longitude and latitude (WGS 84)' },
  { code: 'EPSG:3857', label: 'Web Mercator' },
  ...[10, 11, 12, 13, 14, 15, 16, 17, 18, 19].map((zone) => ({
    code: `EPSG:${26900 + zone}`,
    label: `UTM zone ${zone} north (NAD 83)`,
  })),
];

/** The proj4 definition of an offered code, of any UTM code, or the text itself when it is WKT or a proj string. */
export function definitionOf(crs: string): Outcome<string> {
  const text = crs.trim();
  const utm = /^EPSG:(?:269|326)(\d\d)$/i.exec(text);
  if (utm && Number(utm[1]) >= 1 && Number(utm[1]) <= 60)
    return good(`+proj=utm +zone=${Number(utm[1])} +ellps=GRS80 +datum=NAD83 +units=m +no_defs`);
  if (/^EPSG:4326$|^EPSG:4269$|^WGS ?84$/i.test(text)) return good('EPSG:4326');
  if (/^EPSG:3857$/i.test(text)) return good('EPSG:3857');
  try {
    proj4(text);
    return good(text);
  } catch {
    return bad(
      `The coordinate system "${text.slice(0, 60)}" is not known. Choose one from the list, or paste the text of its .prj file.`,
    );
  }
}

/** A guess from one raw coordinate: degrees, web mercator, or a UTM zone cannot be told apart from numbers alone. */
export function guessCrs([x, y]: [number, number]): string | null {
  if (Math.abs(x) <= 180 && Math.abs(y) <= 90) return 'EPSG:4326';
  if (x < -7_000_000 && x > -14_500_000 && y > 2_500_000 && y < 7_500_000) return 'EPSG:3857';
  if (x > 100_000 && x < 900_000 && y > 2_500_000 && y < 6_500_000) return 'EPSG:26915';
  return null;
}
