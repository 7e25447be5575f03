'use client';

import { useMemo, useState } from 'react';
import { formatAcres } from '@/lib/format';
import { Legend } from '@/lib/map/legend';
import { MapView } from '@/lib/map/map-view';
import { Button } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution, Notice } from '@/lib/ui/page';
import type { SurveyInspection } from '../survey/model';
import type { FieldShape } from './check-samples';
import { DRAINAGE_COLORS, NO_DRAINAGE_COLOR } from './drainage-colors';
import { MapUnitTable } from './map-unit-table';

/** The map units of a survey cut to every field, on the map by drainage and in a table with what they say. */
export function CheckSurvey({
  inspection,
  fields,
  pending,
  onKeep,
  onDiscard,
}: {
  inspection: SurveyInspection;
  fields: FieldShape[];
  pending: boolean;
  onKeep: () => void;
  onDiscard: () => void;
}) {
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const covered = useMemo(() => inspection.fields.filter((field) => field.mapUnits.length > 0), [inspection]);
  const polygons = useMemo(() => {
    const units = covered.flatMap((field) =>
      field.mapUnits.map((unit) => ({
        id: `${field.id} ${unit.mapUnitKey}`,
        geometry: unit.geometry,
        fill: unit.drainage ? DRAINAGE_COLORS[unit.drainage] : NO_DRAINAGE_COLOR,
        fillOpacity: 0.85,
        label: unit.symbol,
        sublabel: `${formatAcres(unit.areaAcres)} ac`,
      })),
    );
    return units.length > 0
      ? units
      : fields.map((field) => ({ id: field.id, geometry: field.boundary, fill: '#efe8d6', label: field.name }));
  }, [covered, fields]);
  const used = new Set(covered.flatMap((field) => field.mapUnits.map((unit) => unit.drainage)));
  const words = [...inspection.problems, ...inspection.notes];
  return (
    <div className="flex flex-col gap-5">
      <p>
        <b>{covered.length}</b> of {inspection.fields.length} fields are covered by the survey
        {inspection.areas.length > 0 ? ` of ${inspection.areas.join(', ')}` : ''}. What was kept of a survey for these fields
        before is replaced.
      </p>
      {words.length > 0 ? (
        <Notice kind="attention">
          {words.slice(0, 30).map((one) => (
            <p key={one}>{one}</p>
          ))}
        </Notice>
      ) : null}
      <MapView
        ariaLabel="Map of the soil survey over the fields"
        polygons={polygons}
        selectedId={selectedId}
        onSelect={setSelectedId}
        fitKey={String(covered.length)}
        className="h-80 border border-line lg:h-[28rem]"
      />
      <Legend
        title="Natural drainage"
        items={[
          ...Object.entries(DRAINAGE_COLORS).flatMap(([label, color]) =>
            used.has(label as keyof typeof DRAINAGE_COLORS) ? [{ color, label: `${label} drained` }] : [],
          ),
          ...(used.has(null) ? [{ color: NO_DRAINAGE_COLOR, label: 'not said' }] : []),
        ]}
      />
      {covered.map((field) => (
        <section key={field.id} aria-labelledby={`survey-${field.id}`}>
          <h2 id={`survey-${field.id}`} className="mb-2 text-xl">
            {field.name} <span className="font-normal text-base text-mute">{formatAcres(field.areaAcres)} ac</span>
          </h2>
          <MapUnitTable
            caption={`Map units of ${field.name}`}
            units={field.mapUnits}
            selectedKey={selectedId?.startsWith(`${field.id} `) ? selectedId.slice(field.id.length + 1) : null}
            onSelect={(key) => setSelectedId(`${field.id} ${key}`)}
          />
        </section>
      ))}
      <Caution>{CAUTIONS.soil}</Caution>
      <div className="sticky bottom-0 z-10 flex flex-wrap gap-2 border-line border-t bg-hull py-3">
        <Button kind="action" pending={pending} disabled={covered.length === 0} onClick={onKeep}>
          Keep the survey of {covered.length} {covered.length === 1 ? 'field' : 'fields'}
        </Button>
        <Button pending={pending} onClick={onDiscard}>
          Keep nothing
        </Button>
      </div>
    </div>
  );
}
