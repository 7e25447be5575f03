import { formatNumber } from '@/lib/format';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import type { SoilFigure, SoilYear, SummaryFigure } from '../history';

const COLUMNS: { figure: SummaryFigure; head: string; unit: string; digits: number }[] = [
  { figure: 'ph', head: 'pH', unit: '', digits: 1 },
  { figure: 'bufferPh', head: 'Buffer pH', unit: '', digits: 1 },
  { figure: 'organicMatterPercent', head: 'OM', unit: '%', digits: 1 },
  { figure: 'cationExchangeCapacity', head: 'CEC', unit: 'meq/100 g', digits: 1 },
  { figure: 'phosphorusPpm', head: 'P', unit: 'ppm', digits: 0 },
  { figure: 'potassiumPpm', head: 'K', unit: 'ppm', digits: 0 },
  { figure: 'carbonatePercent', head: 'Carbonate', unit: '%', digits: 1 },
  { figure: 'electricalConductivity', head: 'EC', unit: 'dS/m', digits: 2 },
  { figure: 'cystEggsPer100cc', head: 'Cyst eggs', unit: 'per 100 cc', digits: 0 },
];

/** Soil tests of a field year by year: the mean, and the lowest and highest under it. */
export function SoilHistory({ years }: { years: SoilYear[] }) {
  if (years.length === 0) return <p className="text-mute">No soil tests yet.</p>;
  const used = COLUMNS.filter((column) => years.some((year) => year.figures[column.figure] !== null));
  return (
    <>
      <Table caption="Soil tests by year" stacked>
        <thead>
          <tr>
            <Th>Year</Th>
            <Th>Samples</Th>
            {used.map((column) => (
              <Th key={column.figure} numeric>
                {column.head}
              </Th>
            ))}
          </tr>
        </thead>
        <tbody>
          {years.map((year) => (
            <tr key={year.year ?? 'undated'}>
              <Td>
                <b>{year.year ?? 'no date'}</b>
              </Td>
              <Td>
                {year.sampleCount} {year.pointCount === 0 ? 'without a place' : year.sampleCount === 1 ? 'sample' : 'samples'}
              </Td>
              {used.map((column) => (
                <Td key={column.figure} numeric>
                  <span className="sm:hidden">{column.head} </span>
                  <FigureCell figure={year.figures[column.figure]} digits={column.digits} unit={column.unit} />
                </Td>
              ))}
            </tr>
          ))}
        </tbody>
      </Table>
      <Caution className="mt-2">{CAUTIONS.soil}</Caution>
    </>
  );
}

function FigureCell({ figure, digits, unit }: { figure: SoilFigure | null; digits: number; unit: string }) {
  if (!figure) return '—';
  return (
    <>
      {formatNumber(figure.mean, digits)}
      {unit ? ` ${unit}` : ''}
      {figure.low !== figure.high ? (
        <span className="block text-[0.88em] text-mute">
          {formatNumber(figure.low, digits)}–{formatNumber(figure.high, digits)}
        </span>
      ) : null}
    </>
  );
}
