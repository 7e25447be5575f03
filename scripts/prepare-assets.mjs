// Copies what the browser needs from packages into public/map, so that it always fits the installed version.
import { copyFileSync, mkdirSync } from 'node:fs';

mkdirSync('public/map', { recursive: true });
for (const name of ['maplibre-gl-worker.mjs', 'maplibre-gl-shared.mjs'])
  copyFileSync(`node_modules/maplibre-gl/dist/${name}`, `public/map/${name}`);
copyFileSync('node_modules/us-atlas/states-10m.json', 'public/map/states-10m.json');
copyFileSync('node_modules/us-atlas/counties-10m.json', 'public/map/counties-10m.json');
