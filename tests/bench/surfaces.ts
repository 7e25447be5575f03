import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fitSurface, type SurfacePoint } from '@/features/soil/surface';
import { type Figure, medianMilliseconds, seeded } from './figure';

const POINTS = 500;
const SIDE_CELLS = 200;
const CELL_METERS = 20;
const EXTENT = SIDE_CELLS * CELL_METERS;
/** GDAL's own work is too short to time beside its start, so it is timed on a grid this many times as large. */
const GDAL_TIMES = 100;

function points(): SurfacePoint[] {
  const random = seeded(3);
  return Array.from({ length: POINTS }, () => {
    const x = random() * EXTENT;
    const y = random() * EXTENT;
    return { x, y, value: 6.3 + 0.6 * Math.sin(x / 500) * Math.cos(y / 700) + 0.2 * (random() - 0.5) };
  });
}

const grid = { columns: SIDE_CELLS, rows: SIDE_CELLS, cellMeters: CELL_METERS, left: 0, top: EXTENT };
const cells = Int32Array.from({ length: SIDE_CELLS * SIDE_CELLS }, (_, i) => i);

function wholeProcess(command: string, args: string[]): number {
  return medianMilliseconds(() => void execFileSync(command, args, { stdio: 'ignore' }), 7, 1);
}

function gdalFigures(ours: number): Figure[] {
  if (spawnSync('gdal_grid', ['--version'], { stdio: 'ignore' }).status !== 0) {
    return [{ what: 'gdal_grid is not on this machine, so nothing to compare with', measured: 0, unit: '', goal: null }];
  }
  const folder = mkdtempSync(join(tmpdir(), 'hilum-bench-'));
  const csv = join(folder, 'p.csv');
  const layer = join(folder, 'p.vrt');
  writeFileSync(
    csv,
    `x,y,z\n${points()
      .map(({ x, y, value }) => `${x},${y},${value}`)
      .join('\n')}\n`,
  );
  writeFileSync(
    layer,
    `<OGRVRTDataSource><OGRVRTLayer name="p"><SrcDataSource>${csv}</SrcDataSource><GeometryType>wkbPoint</GeometryType><GeometryField encoding="PointFromColumns" x="x" y="y" z="z"/></OGRVRTLayer></OGRVRTDataSource>`,
  );
  const run = (side: number, threads: string) => {
    const extent = ['-txe', '0', String(EXTENT), '-tye', String(EXTENT), '0', '-outsize', String(side), String(side)];
    return [
      '--config',
      'GDAL_NUM_THREADS',
      threads,
      '-q',
      '-a',
      'invdist:power=2.0:smoothing=0.0',
      ...extent,
      '-zfield',
      'z',
      '-l',
      'p',
      layer,
      join(folder, 'o.tif'),
    ];
  };
  const start = wholeProcess('gdal_grid', run(2, '1'));
  const large = wholeProcess('gdal_grid', run(SIDE_CELLS * Math.sqrt(GDAL_TIMES), '1'));
  const whole = wholeProcess('gdal_grid', run(SIDE_CELLS, 'ALL_CPUS'));
  const node = wholeProcess('node', ['-e', '0']);
  const command = [
    '--import',
    'tsx',
    'scripts/hilum.ts',
    'surface',
    csv,
    '--x',
    'x',
    '--y',
    'y',
    '--value',
    'z',
    '--planar',
    '--method',
    'idw',
  ];
  const hilum = wholeProcess('node', command);
  rmSync(folder, { recursive: true });
  const algorithm = (large - start) / GDAL_TIMES;
  return [
    { what: 'gdal_grid -a invdist of the same, algorithm, one thread', measured: algorithm, unit: 'ms', goal: null },
    { what: '  ours ÷ gdal_grid, algorithm', measured: ours / algorithm, unit: '×', goal: 1 },
    { what: 'gdal_grid, whole process, all threads', measured: whole, unit: 'ms', goal: null },
    { what: '  bare node that does nothing, whole process', measured: node, unit: 'ms', goal: null },
    {
      what: '  ours inside a running node (surface and grid) ÷ gdal_grid, whole process',
      measured: ours / whole,
      unit: '×',
      goal: 1,
    },
    { what: '  hilum surface at the command line, from source, whole process', measured: hilum, unit: 'ms', goal: null },
  ];
}

export function surfaceFigures(): Figure[] {
  const list = points();
  const kriged = medianMilliseconds(
    () => {
      const fitted = fitSurface(list, { method: 'kriging' });
      fitted?.over(grid, cells);
    },
    7,
    2,
  );
  const fitAlone = medianMilliseconds(() => void fitSurface(list, { method: 'kriging' }), 7, 1);
  const weighted = fitSurface(list, { method: 'idw' });
  const idw = medianMilliseconds(() => void weighted?.over(grid, cells), 41, 20);
  const shape = `${POINTS} points, ${(SIDE_CELLS * SIDE_CELLS).toLocaleString('en-US')} cells`;
  return [
    { what: `kriged surface, ${shape}, with fit and leave-one-out`, measured: kriged, unit: 'ms', goal: 400 },
    { what: '  of that variogram, system and leave-one-out', measured: fitAlone, unit: 'ms', goal: null },
    { what: `inverse distance surface, ${shape}`, measured: idw, unit: 'ms', goal: null },
    ...gdalFigures(idw),
  ];
}
