'use client';

import { formatAcres, formatNumber, formatPercent } from '@/lib/format';
import { Table, Td, Th } from '@/lib/ui/table';
import type { SoilMapUnit } from '../model';

type Unit = Omit<SoilMapUnit, 'id' | 'fieldId'>;

/** What the survey says of each map unit of a field. Words stand with every figure, so that a stacked row reads alone. */
export function MapUnitTable({
  caption,
  units,
  selectedKey = null,
  onSelect,
}: {
  caption: string;
  units: Unit[];
  selectedKey?: string | null;
  onSelect?: (mapUnitKey: string) => void;
}) {
  return (
    <Table caption={caption} stacked>
      <thead>
        <tr>
          <Th>Map unit</Th>
          <Th numeric>Acres</Th>
          <Th>Drainage</Th>
          <Th>Hydrologic group</Th>
          <Th numeric>Slope</Th>
          <Th numeric>Water to 100 cm</Th>
          <Th>Flooding</Th>
          <Th numeric>pH, top 30 cm</Th>
          <Th numeric>Carbonate</Th>
        </tr>
      </thead>
      <tbody>
        {units.map((unit) => (
          <tr key={unit.mapUnitKey} className={selectedKey === unit.mapUnitKey ? 'bg-bloom-light' : ''}>
            <Td>
              {onSelect ? (
                <button
                  type="button"
                  className="min-h-11 text-left underline underline-offset-4 lg:min-h-0"
                  onClick={() => onSelect(unit.mapUnitKey)}
                >
                  <b>{unit.symbol}</b> {unit.name}
                </button>
              ) : (
                <>
                  <b>{unit.symbol}</b> {unit.name}
                </>
              )}
            </Td>
            <Td numeric className="whitespace-nowrap">
              {formatAcres(unit.areaAcres)} ac ({formatPercent(unit.share)})
            </Td>
            <Td>{unit.drainage ? `${unit.drainage} drained` : '—'}</Td>
            <Td>{unit.hydrologicGroup ? `group ${unit.hydrologicGroup}` : '—'}</Td>
            <Td numeric>{unit.slopePercent === null ? '—' : `${formatNumber(unit.slopePercent, 1)} % slope`}</Td>
            <Td numeric>{unit.availableWaterInches === null ? '—' : `${formatNumber(unit.availableWaterInches, 1)} in`}</Td>
            <Td>{unit.flooding === null ? '—' : unit.flooding === 'none' ? 'no flooding' : `${unit.flooding} flooding`}</Td>
            <Td numeric>{unit.surfacePh === null ? '—' : `pH ${formatNumber(unit.surfacePh, 1)}`}</Td>
            <Td numeric>
              {unit.surfaceCarbonatePercent === null ? '—' : `${formatNumber(unit.surfaceCarbonatePercent, 1)} % carbonate`}
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
