/** A laboratory's results without places + a sampler's points without results → samples with both, by sample number. Pure. */
import { MEASURES, type ReadSample } from './samples';

export interface JoinedTable {
  name: string;
  samples: ReadSample[];
}

function key(id: string | null): string | null {
  if (id === null) return null;
  // "007", "7.0" and "7" are one number; letters are kept.
  const text = id
    .trim()
    .toLowerCase()
    .replace(/^0+(?=\d)/, '')
    .replace(/\.0+$/, '');
  return text || null;
}

function hasResults(sample: ReadSample): boolean {
  return MEASURES.some((measure) => sample[measure] !== null);
}

function list(ids: string[]): string {
  return `${ids.slice(0, 12).join(', ')}${ids.length > 12 ? `, and ${ids.length - 12} more` : ''}`;
}

/**
 * Joins tables of results to tables of points by sample number (and by field name where one number stands in several fields).
 * Results that meet no point are kept without a place; points without results are left out; both are said.
 */
export function joinTables(tables: JoinedTable[]): { samples: ReadSample[]; notes: string[]; problems: string[] } {
  const results = tables.filter((table) => table.samples.some(hasResults));
  const places = tables.filter((table) => !results.includes(table) && table.samples.some((one) => one.longitude !== null));
  const samples = results.flatMap((table) => table.samples);
  const notes: string[] = [];
  const problems: string[] = [];
  if (places.length === 0)
    return { samples: samples.length > 0 ? samples : tables.flatMap((table) => table.samples), notes, problems };
  const points = places.flatMap((table) => table.samples);
  const names = places.map((table) => table.name).join(', ');
  if (results.length === 0) {
    problems.push(`${names}: the points have no results. Choose the laboratory's file together with them.`);
    return { samples: [], notes, problems };
  }

  const byId = new Map<string, ReadSample[]>();
  for (const point of points) {
    const id = key(point.id);
    if (id) byId.set(id, [...(byId.get(id) ?? []), point]);
  }
  const met = new Set<ReadSample>();
  const lost: string[] = [];
  const doubtful: string[] = [];
  let joined = 0;
  const out = samples.map((sample) => {
    const id = key(sample.id);
    if (sample.longitude !== null || id === null) return sample;
    let candidates = byId.get(id) ?? [];
    if (candidates.length > 1) {
      const field = sample.fieldName?.toLowerCase();
      const same = candidates.filter((one) => field && one.fieldName?.toLowerCase() === field);
      if (same.length > 0) candidates = same;
    }
    const [point] = candidates;
    if (!point) {
      lost.push(sample.id as string);
      return sample;
    }
    for (const one of candidates) met.add(one);
    if (candidates.some((one) => one.longitude !== point.longitude || one.latitude !== point.latitude)) {
      doubtful.push(sample.id as string);
      return sample;
    }
    joined += 1;
    return {
      ...sample,
      longitude: point.longitude,
      latitude: point.latitude,
      fieldName: sample.fieldName ?? point.fieldName,
      sampledOn: sample.sampledOn ?? point.sampledOn,
      sampledYearOnly: sample.sampledOn ? sample.sampledYearOnly : point.sampledYearOnly,
      depthInches: sample.depthInches ?? point.depthInches,
    };
  });
  const alone = points.filter((point) => !met.has(point)).map((point) => point.id ?? `point ${point.row}`);
  notes.push(`${joined} of ${samples.length} results met their point by sample number (${names}).`);
  if (lost.length > 0)
    problems.push(
      `${lost.length === 1 ? 'One result' : `${lost.length} results`} met no point and ${lost.length === 1 ? 'has' : 'have'} no place: sample ${list(lost)}.`,
    );
  if (alone.length > 0)
    problems.push(
      `${alone.length === 1 ? 'One point' : `${alone.length} points`} met no result and ${alone.length === 1 ? 'was' : 'were'} left out: sample ${list(alone)}.`,
    );
  if (doubtful.length > 0)
    problems.push(
      `${doubtful.length} sample numbers stand at several points, so their place is not known: sample ${list([...new Set(doubtful)])}.`,
    );
  return { samples: out, notes, problems };
}
