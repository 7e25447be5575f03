'use client';

import { useMemo } from 'react';
import { Legend } from '@/lib/map/legend';
import { MapView } from '@/lib/map/map-view';
import { PH_SCALE, phClass } from '@/lib/map/ph-scale';
import type { InspectedSample } from '../import-model';
import type { FieldShape } from './check-samples';

const NO_PH = '#6f6557';

/** The samples of a file over the fields, coloured by pH; strays stand out by lying outside. */
export function SampleMap({
  samples,
  fields,
  selectedId,
  onSelect,
}: {
  samples: InspectedSample[];
  fields: FieldShape[];
  selectedId: string | null;
  onSelect: (id: string) => void;
}) {
  const used = useMemo(() => new Set(samples.map((sample) => sample.fieldId)), [samples]);
  const polygons = useMemo(
    () =>
      fields.map((field) => ({
        id: field.id,
        geometry: field.boundary,
        fill: used.has(field.id) ? '#fbf8f0' : '#efe8d6',
        fillOpacity: 0.9,
        label: field.name,
      })),
    [fields, used],
  );
  const points = useMemo(() => {
    const placed = samples.flatMap((sample, index) => (sample.longitude === null ? [] : [{ sample, index }]));
    return placed.map(({ sample, index }) => ({
      id: `sample ${index}`,
      longitude: sample.longitude as number,
      latitude: sample.latitude as number,
      color: sample.ph === null ? NO_PH : phClass(sample.ph).color,
      label: placed.length <= 60 ? sample.ph?.toFixed(1) : undefined,
    }));
  }, [samples]);
  if (points.length === 0) return null;
  const near = fields.filter((field) => used.has(field.id)).map((field) => field.boundary);
  return (
    <div className="flex flex-col gap-2">
      <MapView
        ariaLabel="Map of the samples over the fields"
        polygons={polygons}
        points={points}
        selectedId={selectedId}
        onSelect={onSelect}
        fitKey="samples"
        fitTo={near.length > 0 ? near : undefined}
        className="h-80 border border-line lg:h-[28rem]"
      />
      <Legend
        title="pH of the samples"
        items={[
          ...PH_SCALE.map((one) => ({ color: one.color, label: one.label, note: one.words })),
          { color: NO_PH, label: 'no pH' },
        ]}
      />
    </div>
  );
}
