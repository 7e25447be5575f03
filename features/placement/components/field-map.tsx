'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useMemo, useState } from 'react';
import type { Boundary, Field } from '@/features/fields/model';
import type { SoilMapUnit, SoilSample } from '@/features/soil/model';
import type { FieldSurface } from '@/features/soil/surface';
import { formatAcres, formatBushels } from '@/lib/format';
import { Legend } from '@/lib/map/legend';
import { MapView } from '@/lib/map/map-view';
import { PH_SCALE, phClass } from '@/lib/map/ph-scale';
import type { TileLayer } from '@/lib/map/style';
import { surfaceImage } from '@/lib/map/surface-image';
import { DRAINAGE_CLASSES, type DrainageClass } from '../engine/model';
import { FIELD_LAYERS, type FieldLayer } from '../view';
import { pickColours } from './factor-colours';

/** Room above for the layers and their key, and around for the neighbours. */
const FIT_PADDING = { top: 150, right: 56, bottom: 48, left: 56 };

/** Dry to wet. */
const DRAINAGE_COLOURS: Record<DrainageClass, string> = {
  excessively: '#e8c98f',
  'somewhat excessively': '#e3d5a8',
  well: '#cfd8b0',
  'moderately well': '#b3cfb9',
  'somewhat poorly': '#9bbcc4',
  poorly: '#8aa0c4',
  'very poorly': '#7b80b5',
};
const UNIT_COLOURS = ['#d8c9a3', '#bcd0b4', '#c9bddb', '#e2bda8', '#b5c9d6', '#d6d09a', '#cfb7a8', '#b9c7b0'];

export interface Neighbour {
  id: string;
  name: string;
  boundary: Boundary;
  areaAcres: number;
  pickCode: string | null;
  expected: number | null;
}

/** The field among its neighbours, with one layer at a time. */
export function FieldMap({
  field,
  neighbours,
  layer,
  onLayer,
  surface,
  samples,
  mapUnits,
  statedDrainage,
  tiles,
  className,
}: {
  field: Field;
  neighbours: Neighbour[];
  layer: FieldLayer;
  onLayer: (layer: FieldLayer) => void;
  surface: FieldSurface | null;
  samples: SoilSample[];
  mapUnits: SoilMapUnit[];
  statedDrainage: DrainageClass | null;
  tiles: TileLayer | null;
  className?: string;
}) {
  const router = useRouter();
  const [image, setImage] = useState<string | null>(null);
  useEffect(() => {
    setImage(layer === 'ph' && surface ? surfaceImage(surface, field.boundary, (ph) => phClass(ph).color) : null);
  }, [layer, surface, field.boundary]);

  const colours = useMemo(() => pickColours(neighbours.flatMap((one) => one.pickCode ?? [])), [neighbours]);
  const unitColours = useMemo(
    () =>
      new Map(
        [...new Set(mapUnits.map((unit) => unit.symbol))].map((symbol, index) => [
          symbol,
          UNIT_COLOURS[index % UNIT_COLOURS.length] as string,
        ]),
      ),
    [mapUnits],
  );

  const polygons = useMemo(() => {
    const around = neighbours.map((one) => ({
      id: one.id,
      geometry: one.boundary,
      fill: layer === 'picks' && one.pickCode ? colours.get(one.pickCode) : '#efe8d6',
      // What lies over the field itself must not be tinted by it.
      fillOpacity: one.id !== field.id ? 0.75 : (layer === 'ph' && surface) || layer === 'survey' ? 0.001 : 1,
      label: one.id === field.id && layer !== 'picks' ? undefined : one.name,
      sublabel: one.pickCode ? `${one.pickCode} · ${formatBushels(one.expected)}` : `${formatAcres(one.areaAcres)} ac`,
    }));
    if (layer === 'survey' || (layer === 'drainage' && mapUnits.length > 0)) {
      return [
        ...around,
        ...mapUnits.map((unit) => ({
          id: field.id,
          geometry: unit.geometry,
          fill: layer === 'survey' ? unitColours.get(unit.symbol) : unit.drainage ? DRAINAGE_COLOURS[unit.drainage] : '#efe8d6',
          label: layer === 'survey' ? unit.symbol : (unit.drainage ?? 'not said'),
          sublabel: `${formatAcres(unit.areaAcres)} ac`,
        })),
      ];
    }
    if (layer === 'drainage' && statedDrainage) {
      return around.map((one) =>
        one.id === field.id
          ? { ...one, fill: DRAINAGE_COLOURS[statedDrainage], label: statedDrainage, sublabel: 'as stated' }
          : one,
      );
    }
    return around;
  }, [neighbours, layer, colours, field.id, mapUnits, unitColours, statedDrainage, surface]);

  const points = useMemo(
    () =>
      layer === 'ph'
        ? samples.flatMap((sample) =>
            sample.ph !== null && sample.latitude !== null && sample.longitude !== null
              ? [
                  {
                    id: sample.id,
                    longitude: sample.longitude,
                    latitude: sample.latitude,
                    label: samples.length <= 90 ? sample.ph.toFixed(1) : undefined,
                    color: '#221d17',
                  },
                ]
              : [],
          )
        : [],
    [layer, samples],
  );
  const available = FIELD_LAYERS.filter((one) => one.key !== 'survey' || mapUnits.length > 0);
  const fitTo = useMemo(() => [field.boundary], [field.boundary]);

  return (
    <MapView
      ariaLabel={`Map of ${field.name}: ${FIELD_LAYERS.find((one) => one.key === layer)?.label}`}
      polygons={polygons}
      points={points}
      raster={image && surface ? { url: image, bounds: surface.bounds } : null}
      selectedId={field.id}
      onSelect={(id) => {
        if (id !== field.id) router.push(`/fields/${id}${layer === 'picks' ? '' : `?layer=${layer}`}`);
      }}
      fitKey={field.id}
      fitTo={fitTo}
      fitPadding={FIT_PADDING}
      tiles={tiles}
      className={className}
    >
      <div className="absolute top-3 right-3 left-3 flex flex-wrap items-start justify-between gap-2">
        <fieldset className="flex flex-wrap border border-line bg-paper">
          <legend className="sr-only">Map layer</legend>
          {available.map((one) => (
            <button
              key={one.key}
              type="button"
              aria-pressed={layer === one.key}
              onClick={() => onLayer(one.key)}
              className={`min-h-11 border-line px-3 not-first:border-l lg:min-h-9 ${layer === one.key ? 'bg-bloom font-semibold text-white' : 'hover:bg-bloom-light'}`}
            >
              {one.label}
            </button>
          ))}
        </fieldset>
        <LayerKey layer={layer} surface={surface} mapUnits={mapUnits} unitColours={unitColours} statedDrainage={statedDrainage} />
      </div>
    </MapView>
  );
}

function LayerKey({
  layer,
  surface,
  mapUnits,
  unitColours,
  statedDrainage,
}: {
  layer: FieldLayer;
  surface: FieldSurface | null;
  mapUnits: SoilMapUnit[];
  unitColours: Map<string, string>;
  statedDrainage: DrainageClass | null;
}) {
  if (layer === 'ph') {
    if (!surface) return <Legend title="Soil pH: no located soil test yet" items={[]} />;
    const how = { kriging: 'kriged', idw: 'by inverse distance', mean: 'the mean of the tests' }[surface.method];
    const error =
      surface.leaveOneOutRmse === null ? '' : `, off by ±${surface.leaveOneOutRmse.toFixed(2)} when each test is left out`;
    return (
      <div className="max-w-80">
        <Legend title="Soil pH" items={PH_SCALE.map(({ color, label }) => ({ color, label }))} />
        <p className="border border-line border-t-0 bg-paper px-3 py-1 text-[12px] text-mute">
          {surface.pointCount} tests, {how}
          {error}. pH is averaged as pH.
        </p>
      </div>
    );
  }
  if (layer === 'drainage') {
    const present = new Set(mapUnits.length > 0 ? mapUnits.map((unit) => unit.drainage) : [statedDrainage]);
    const items = DRAINAGE_CLASSES.filter((one) => present.has(one)).map((one) => ({ color: DRAINAGE_COLOURS[one], label: one }));
    return (
      <Legend title={items.length > 0 ? 'Natural drainage (tile does not change it)' : 'Drainage: not said yet'} items={items} />
    );
  }
  if (layer === 'survey') {
    const seen = [...new Map(mapUnits.map((unit) => [unit.symbol, unit.name]))];
    return (
      <div className="max-w-96">
        <Legend
          title="Soil survey map units"
          items={seen.map(([symbol, name]) => ({ color: unitColours.get(symbol) as string, label: symbol, note: name }))}
        />
      </div>
    );
  }
  return null;
}
