import { describe, expect, test } from 'vitest';
import { readBoundaries } from '@/features/fields/readers/read-boundaries';
import { zipOf } from '@/features/plans/exports/zip';
import { isZip, unpack } from '@/lib/archive';
import { aSquare } from '../support/fields';
import { dbfOf, shpOf, UTM_15_PRJ, zippedShapefile } from '../support/shapefiles';

/** Odd and hostile boundary files, made here: every one ends in a value or a sentence, quickly, and never throws. */
const good = { geometry: aSquare(), attributes: { FIELD: 'Home', FARM: 'Farm' } };
const text = (words: string) => new TextEncoder().encode(words);
const collection = (features: unknown[]) => JSON.stringify({ type: 'FeatureCollection', features });
const feature = (geometry: unknown, properties: unknown = { name: 'One' }) => ({ type: 'Feature', geometry, properties });
const kmlOf = (coordinates: string) =>
  `<?xml version="1.0"?><kml xmlns="http://www.opengis.net/kml/2.2"><Document><Placemark><name>One</name><Polygon><outerBoundaryIs><LinearRing><coordinates>${coordinates}</coordinates></LinearRing></outerBoundaryIs></Polygon></Placemark></Document></kml>`;
const ring = (aSquare().coordinates[0] as number[][]).map((point) => point.join(',')).join(' ');

async function read(name: string, bytes: Uint8Array, limitMilliseconds = 5000) {
  const start = performance.now();
  const outcome = await readBoundaries([{ name, bytes }]);
  expect(performance.now() - start).toBeLessThan(limitMilliseconds);
  if (!outcome.ok) expect(outcome.problems[0]?.message.length).toBeGreaterThan(20);
  return outcome;
}

/** The sentence a file ends in. */
async function refusal(name: string, bytes: Uint8Array): Promise<string> {
  const outcome = await read(name, bytes);
  return outcome.ok ? 'read' : (outcome.problems[0]?.message ?? '');
}

/** What is said of the first shape of a file that can be read. */
async function firstProblem(name: string, bytes: Uint8Array): Promise<string> {
  const outcome = await read(name, bytes);
  return outcome.ok ? (outcome.value.features[0]?.problems.join(' ') ?? 'no shape') : `refused: ${outcome.problems[0]?.message}`;
}

describe('files that are refused with a sentence', () => {
  const zip = (files: Record<string, Uint8Array>) =>
    Buffer.from(zipOf(Object.entries(files).map(([name, bytes]) => ({ name, bytes }))));
  const shp = shpOf([good], UTM_15_PRJ);
  const dbf = dbfOf([good.attributes]);
  const points = Buffer.from(shp);
  points.writeInt32LE(1, 32);
  const lines = Buffer.from(shp);
  lines.writeInt32LE(3, 32);
  const zeros = zip({ 'Fields.dbf': new Uint8Array(60_000_000), 'Fields.shp': shp });
  const encrypted = Buffer.from(zippedShapefile([good]));
  for (let at = 0; at < encrypted.length - 4; at += 1) {
    if (encrypted.readUInt32LE(at) === 0x02014b50) encrypted.writeUInt16LE(encrypted.readUInt16LE(at + 8) | 1, at + 8);
  }
  const cases: [string, string, Uint8Array, RegExp][] = [
    ['not a zip', 'fields.zip', text('this is a letter'), /not a zip archive/],
    ['an empty file', 'fields.zip', new Uint8Array(0), /is empty/],
    ['a zip with no .shp', 'fields.zip', zip({ 'readme.txt': text('hello') }), /no \.shp file/],
    ['an empty zip', 'fields.zip', Buffer.from([0x50, 0x4b, 5, 6, ...new Array(18).fill(0)]), /empty archive/],
    ['points only', 'fields.zip', zip({ 'a.shp': points, 'a.dbf': dbf }), /holds points, not boundaries/],
    ['lines only', 'fields.zip', zip({ 'a.shp': lines, 'a.dbf': dbf }), /holds lines, not boundaries/],
    ['a .shp that is not one', 'fields.zip', zip({ 'a.shp': text('x'.repeat(400)) }), /is not a shapefile/],
    ['a .shp of one byte', 'fields.zip', zip({ 'a.shp': text('x') }), /is not a shapefile/],
    ['sixty megabytes of zeros, zipped', 'fields.zip', zeros, /more than 200 times its size/],
    ['an archive locked with a password', 'fields.zip', encrypted, /locked with a password/],
    ['a path that climbs out', 'fields.zip', zip({ '../../etc/fields.shp': shp }), /damaged/],
    ['an absolute path', 'fields.zip', zip({ '/etc/fields.shp': shp }), /damaged/],
    [
      'the same file twice',
      'fields.zip',
      Buffer.from(
        zipOf([
          { name: 'a.shp', bytes: shp },
          { name: 'a.shp', bytes: shp },
        ]),
      ),
      /twice/,
    ],
    [
      'more files than any layer has',
      'fields.zip',
      Buffer.from(zipOf(Array.from({ length: 2100 }, (_, index) => ({ name: `f${index}.txt`, bytes: text('x') })))),
      /more than 2,000 files/,
    ],
    [
      'a .prj of an unknown system',
      'fields.zip',
      zip({ 'a.shp': shp, 'a.prj': text('PROJCS["Moon",NOTHING]') }),
      /coordinate system/,
    ],
    [
      'a .prj that is binary noise',
      'fields.zip',
      zip({ 'a.shp': shp, 'a.prj': Buffer.from([1, 2, 3, 255, 254]) }),
      /coordinate system/,
    ],
    ['JSON that breaks off', 'fields.geojson', text('{"type":"FeatureCollection","features":[{'), /is not GeoJSON/],
    ['JSON that is a number', 'fields.geojson', text('42'), /is not GeoJSON/],
    ['a collection without features', 'fields.geojson', text('{"type":"FeatureCollection"}'), /without features/],
    ['a collection of nothing', 'fields.geojson', text(collection([])), /holds no shapes/],
    [
      'GeoJSON in UTM by its CRS member',
      'fields.geojson',
      text(
        JSON.stringify({
          type: 'FeatureCollection',
          crs: { type: 'name', properties: { name: 'urn:ogc:def:crs:EPSG::26915' } },
          features: [feature(aSquare())],
        }),
      ),
      /longitude and latitude/,
    ],
    ['KML that breaks off', 'fields.kml', text(kmlOf(ring).slice(0, 200)), /not whole/],
    [
      'KML with entities of its own',
      'fields.kml',
      text(`<!DOCTYPE kml [<!ENTITY a "aaaaaaaaaa"><!ENTITY b "&a;&a;&a;">]>${kmlOf(ring)}`),
      /entities of its own/,
    ],
    [
      'KML of points',
      'fields.kml',
      text('<kml><Placemark><Point><coordinates>1,2</coordinates></Point></Placemark></kml>'),
      /no outlines/,
    ],
    ['KMZ with no KML', 'fields.kmz', zip({ 'doc.txt': text('x') }), /no \.kml file/],
    ['a picture', 'field.png', Buffer.from([0x89, 0x50, 0x4e, 0x47, 1, 2, 3, 4]), /not a boundary file/],
    ['a PDF', 'field.pdf', text('%PDF-1.7 hello'), /not a boundary file/],
  ];
  test.each(cases)('%s', async (_what, name, bytes, words) => {
    expect(await refusal(name, bytes)).toMatch(words);
  });

  test('a zip cut short at any place is refused or read, never waited for', async () => {
    const whole = zippedShapefile([good, { ...good, geometry: aSquare(2) }]);
    for (let length = 0; length < whole.length; length += 13) {
      const outcome = await read('fields.zip', whole.subarray(0, length), 1000);
      expect(outcome.ok, `at ${length} of ${whole.length} bytes`).toBe(false);
    }
  });

  test('a .shp cut short keeps the whole shapes before the cut and says so', async () => {
    const layer = shpOf([good, { ...good, geometry: aSquare(2) }, { ...good, geometry: aSquare(4) }], UTM_15_PRJ);
    for (let length = 0; length < layer.length; length += 17) {
      const bytes = Buffer.from(
        zipOf([
          { name: 'a.shp', bytes: layer.subarray(0, length) },
          { name: 'a.prj', bytes: text(UTM_15_PRJ) },
        ]),
      );
      const outcome = await read('fields.zip', bytes, 1000);
      if (outcome.ok && outcome.value.features.length < 3) expect(outcome.value.notes.join(' ')).toMatch(/damaged after shape/);
    }
  });
});

describe('shapes that are read and explained', () => {
  const [a, b, c, d] = aSquare().coordinates[0] as [number[], number[], number[], number[]];
  const polygon = (corners: unknown) => text(collection([feature({ type: 'Polygon', coordinates: [corners] })]));
  const cases: [string, Uint8Array, RegExp][] = [
    ['an outline that crosses itself is mended and said so', polygon([a, c, b, d, a]), /crossed itself\. It was mended/],
    ['an empty shape', text(collection([feature(null)])), /empty/],
    ['a point', text(collection([feature({ type: 'Point', coordinates: [-93, 42] })])), /a point, not an outline/],
    ['a line', text(collection([feature({ type: 'LineString', coordinates: [a, b] })])), /a line, not an outline/],
    ['two corners only', polygon([a, b, a]), /no area/],
    ['the same corner ten times', polygon(new Array(10).fill(a)), /no area/],
    [
      'coordinates in metres without a system',
      polygon([
        [457000, 4538000],
        [458000, 4538000],
        [458000, 4539000],
        [457000, 4538000],
      ]),
      /not on the earth/,
    ],
    ['a coordinate of 1e300', polygon([a, b, [1e300, 42], a]), /not on the earth/],
    ['a coordinate that is a word', polygon([a, b, ['east', 42], a]), /not a number/],
    ['a coordinate that is null', polygon([a, b, null, a]), /not a number/],
    ['a ring that is a word', text(collection([feature({ type: 'Polygon', coordinates: ['ring'] })])), /damaged/],
    ['coordinates that are missing', text(collection([feature({ type: 'Polygon' })])), /not an outline|no area|empty/],
    [
      'a field in Australia',
      polygon([
        [150, -33],
        [150.01, -33],
        [150.01, -33.01],
        [150, -33],
      ]),
      /outside the part of North America/,
    ],
    [
      'a garden',
      polygon([a, [(a[0] as number) + 0.0002, a[1]], [(a[0] as number) + 0.0002, (a[1] as number) + 0.0002], a]),
      /under 0\.5 ac/,
    ],
    ['something that is not a shape', text(collection([42])), /not a shape/],
    ['a geometry of an unknown kind', text(collection([feature({ type: 'Circle' })])), /not a shape/],
  ];
  test.each(cases)('%s', async (_what, bytes, words) => {
    expect(await firstProblem('fields.geojson', bytes)).toMatch(words);
  });

  test('a .shp of not-a-number coordinates', async () => {
    const bad = shpOf([good], UTM_15_PRJ);
    bad.writeDoubleLE(Number.NaN, 100 + 8 + 48);
    expect(await refusal('fields.zip', Buffer.from(zipOf([{ name: 'a.shp', bytes: bad }])))).toMatch(/not numbers/);
  });

  test('duplicates and overlaps inside a file are named', async () => {
    const shifted = {
      ...good,
      geometry: {
        ...aSquare(),
        coordinates: [(aSquare().coordinates[0] as number[][]).map(([x, y]) => [(x as number) + 0.002, y as number])],
      },
    };
    const outcome = await read('fields.zip', zippedShapefile([good, good, shifted]));
    const problems = outcome.ok ? outcome.value.features.map((one) => one.problems.join(' ')) : [];
    expect(problems[0]).toBe('');
    expect(problems[1]).toMatch(/The same outline as "Home"/);
    expect(problems[2]).toMatch(/Overlaps "Home"/);
  });

  test('a missing .prj is asked about, with a guess', async () => {
    const outcome = await read('fields.zip', zippedShapefile([good], UTM_15_PRJ, null));
    expect(outcome.ok && outcome.value.unknownCrs?.guess).toBe('EPSG:26915');
  });

  test('folders, upper case names and several layers are read', async () => {
    const bytes = Buffer.from(
      zipOf([
        { name: 'North/FIELDS.SHP', bytes: shpOf([good], UTM_15_PRJ) },
        { name: 'North/FIELDS.DBF', bytes: dbfOf([good.attributes]) },
        { name: 'North/FIELDS.PRJ', bytes: text(UTM_15_PRJ) },
        { name: '__MACOSX/North/._FIELDS.SHP', bytes: text('junk') },
        { name: 'South/fields.shp', bytes: shpOf([{ ...good, geometry: aSquare(3) }], UTM_15_PRJ) },
        { name: 'South/fields.prj', bytes: text(UTM_15_PRJ) },
      ]),
    );
    const outcome = await read('fields.zip', bytes);
    expect(outcome.ok && outcome.value.features.length).toBe(2);
  });
});

/** A small seeded generator, so that a failing mutation can be met again. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 4_294_967_296;
  };
}

function mutated(bytes: Uint8Array, random: () => number): Uint8Array {
  const copy = Uint8Array.from(bytes);
  const changes = 1 + Math.floor(random() * 4);
  for (let change = 0; change < changes; change += 1) {
    const at = Math.floor(random() * copy.length);
    copy[at] = random() < 0.3 ? 255 : random() < 0.3 ? 0 : (copy[at] as number) ^ (1 << Math.floor(random() * 8));
  }
  return random() < 0.15 ? copy.subarray(0, Math.floor(random() * copy.length)) : copy;
}

describe('two thousand seeded mutations of a good file, each format', () => {
  const shp = shpOf([good, { ...good, geometry: aSquare(2) }], UTM_15_PRJ);
  const dbf = dbfOf([good.attributes, good.attributes]);
  const formats: [string, string, (random: () => number) => Uint8Array][] = [
    ['a zipped shapefile, bytes of the archive', 'fields.zip', (random) => mutated(zippedShapefile([good]), random)],
    [
      'a shapefile, bytes of its .shp and .dbf',
      'fields.zip',
      (random) =>
        Buffer.from(
          zipOf([
            { name: 'a.shp', bytes: mutated(shp, random) },
            { name: 'a.dbf', bytes: mutated(dbf, random) },
            { name: 'a.prj', bytes: text(UTM_15_PRJ) },
          ]),
        ),
    ],
    ['GeoJSON', 'fields.geojson', (random) => mutated(text(collection([feature(aSquare()), feature(aSquare(2))])), random)],
    ['KML', 'fields.kml', (random) => mutated(text(kmlOf(ring)), random)],
  ];
  test.each(formats)('%s', async (_what, name, make) => {
    const random = seeded(20_261_201);
    let read = 0;
    let slowest = 0;
    for (let round = 0; round < 2000; round += 1) {
      const bytes = make(random);
      const start = performance.now();
      const outcome = await readBoundaries([{ name, bytes }]);
      slowest = Math.max(slowest, performance.now() - start);
      if (outcome.ok) read += 1;
      else expect(outcome.problems[0]?.message, `round ${round}`).toBeTruthy();
    }
    expect(read).toBeGreaterThan(0);
    expect(slowest).toBeLessThan(3000);
  });
});

describe('archives', () => {
  test('a good archive is told from other bytes by its first four', () => {
    expect(isZip(zippedShapefile([good]))).toBe(true);
    expect(isZip(text('PK no'))).toBe(false);
  });

  test('limits of entries, size and ratio are those given', async () => {
    const bytes = Buffer.from(zipOf([{ name: 'a', bytes: new Uint8Array(2_000_000) }]));
    expect(
      await unpack({ name: 'a.zip', bytes }, () => true, { entries: 10, unpackedBytes: 1_000_000, ratio: 10_000 }),
    ).toMatchObject({ ok: false });
    expect(
      await unpack({ name: 'a.zip', bytes }, () => true, { entries: 10, unpackedBytes: 10_000_000, ratio: 10_000 }),
    ).toMatchObject({ ok: true });
  });
});
