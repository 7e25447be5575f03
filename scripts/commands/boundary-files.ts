import { readdir } from 'node:fs/promises';
import { basename, dirname, extname, join } from 'node:path';
import type { Boundary } from '@/features/fields/model';
import { type ReadBoundaries, readBoundaries } from '@/features/fields/readers/read-boundaries';
import { type InputFile, readInput, refuse } from './command';

/** The parts of a shapefile that lie loose beside the .shp. */
const SHAPEFILE_PARTS = ['.dbf', '.prj', '.shx', '.cpg'];

/** A file, and with a .shp the parts that lie beside it. */
export async function filesWithParts(path: string): Promise<InputFile[]> {
  const file = await readInput(path);
  if (extname(path).toLowerCase() !== '.shp') return [file];
  const stem = basename(path, extname(path));
  const siblings = (await readdir(dirname(path))).filter(
    (name) => basename(name, extname(name)) === stem && SHAPEFILE_PARTS.includes(extname(name).toLowerCase()),
  );
  return [file, ...(await Promise.all(siblings.map((name) => readInput(join(dirname(path), name)))))];
}

export interface BoundaryChoice {
  crs?: string;
  nameColumn?: string;
}

/**
 * Reads a boundary file as the screens do. Either what was read, or the problems that kept it from being read; a shapefile that
 * does not say its coordinate system is such a problem, with a guess.
 */
export async function tryBoundaries(
  path: string,
  choice: BoundaryChoice,
): Promise<{ read: ReadBoundaries | null; problems: string[] }> {
  const outcome = await readBoundaries(await filesWithParts(path), choice);
  if (!outcome.ok) return { read: null, problems: outcome.problems.map((problem) => problem.message) };
  const { unknownCrs } = outcome.value;
  if (unknownCrs) {
    const guess = unknownCrs.guess ? ` It looks like ${unknownCrs.guess}.` : '';
    const example = unknownCrs.example.join(', ');
    return {
      read: null,
      problems: [
        `The file does not say its coordinate system (first corner ${example}).${guess} Give it with --crs, e.g. --crs EPSG:26915.`,
      ],
    };
  }
  return { read: outcome.value, problems: outcome.value.notes };
}

/** A field that a boundary file holds whole: named and with a shape. */
export interface BoundaryField {
  name: string;
  areaAcres: number;
  geometry: Boundary;
}

/** The usable fields of a boundary file, each with a name of its own, and notes about the others. Refuses when none is left. */
export async function boundaryFields(
  path: string,
  choice: BoundaryChoice,
): Promise<{ fields: BoundaryField[]; notes: string[] }> {
  const { read, problems } = await tryBoundaries(path, choice);
  if (!read) return refuse(...problems);
  const notes = [...problems];
  const names = new Map<string, number>();
  const fields = read.features.flatMap((feature, index) => {
    const wanted = feature.name ?? `Field ${index + 1}`;
    for (const problem of feature.problems) notes.push(`${wanted}: ${problem}`);
    if (!feature.geometry || !(feature.areaAcres > 0)) {
      notes.push(`${wanted}: left out, it has no shape.`);
      return [];
    }
    const count = (names.get(wanted.toLowerCase()) ?? 0) + 1;
    names.set(wanted.toLowerCase(), count);
    const name = count === 1 ? wanted : `${wanted} (${count})`;
    if (count > 1) notes.push(`The name ${wanted} stands ${count} times; this one is called ${name}.`);
    return [{ name, areaAcres: feature.areaAcres, geometry: feature.geometry }];
  });
  if (fields.length === 0) refuse(...notes, `${path} holds no field with a shape.`);
  return { fields, notes };
}
