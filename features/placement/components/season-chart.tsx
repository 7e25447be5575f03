import { dayOfYear, formatDay, isoDateOfDay } from '@/lib/dates';
import { formatPercent } from '@/lib/format';
import { freezeCurve } from '../climate/freeze';
import { seasonLine } from '../climate/season-line';
import type { SeasonContext } from '../engine/model';

/** Two drawings of one chart: on a phone the names stand over the bars, so that the letters stay large enough to read. */
const WIDE = { width: 760, left: 74, row: 32, top: 34, nameAbove: false };
const NARROW = { width: 372, left: 0, row: 52, top: 44, nameAbove: true };
type Shape = typeof WIDE;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
/** Heads of the table of dates: short, and what a wide screen adds. */
const HEADS = [
  ['Pick', ''],
  ['Up', ''],
  ['R1', ' flower'],
  ['R5', ' seed'],
  ['R7', ' ± 5 d'],
  ['R8', ' ripe'],
  ['Freeze', ' before R7'],
] as const;
/** Year-to-year spread of R7, days (one standard deviation). */
const R7_SPREAD_DAYS = 5;

interface Row {
  code: string;
  line: ReturnType<typeof seasonLine>;
}

/** Emergence, R1, R5, R7 and R8 of the first picks on a calendar, with the chance of a killing freeze. The table says the same. */
export function SeasonChart({
  picks,
  season,
  plantingDate,
  isAssumed = false,
  tableOpen = false,
}: {
  picks: { code: string; relativeMaturity: number }[];
  season: SeasonContext;
  plantingDate: string;
  /** No planting date is known: the day is the engine's own. */
  isAssumed?: boolean;
  /** Show the dates at once, where there is room for them. */
  tableOpen?: boolean;
}) {
  const rows: Row[] = picks.map(({ code, relativeMaturity }) => ({
    code,
    line: seasonLine({ climate: season.climate, relativeMaturity, plantingDate, parameters: season.parameters }),
  }));
  const first = dayOfYear(plantingDate) - 8;
  const last = Math.max(dayOfYear(`${season.year}-11-05`), season.climate.firstKillingFreezeDayOfYear + 12);
  const nearest = season.climate.stations[0];
  return (
    <section aria-labelledby="season-line">
      <h2 id="season-line" className="text-[1.1em]">
        Season line{' '}
        <span className="font-normal font-sans text-mute text-[0.85em]">
          planted {formatDay(plantingDate)}
          {isAssumed ? ', assumed' : ''} · {season.climate.source === 'normals' ? '30-year normals' : `weather of ${season.year}`}
          {nearest ? `, nearest station ${nearest.name}, ${Math.round(nearest.distanceMiles)} mi` : ''}
        </span>
      </h2>
      <Chart rows={rows} season={season} first={first} last={last} shape={WIDE} className="hidden sm:block" />
      <Chart rows={rows} season={season} first={first} last={last} shape={NARROW} className="sm:hidden" />
      <details open={tableOpen || undefined}>
        <summary className="cursor-pointer font-semibold">The stages as dates</summary>
        <div className="overflow-x-auto">
          <table className="w-full text-left text-[0.92em]">
            <caption className="sr-only">Stages of the first picks and the chance of a killing freeze</caption>
            <thead>
              <tr className="text-mute">
                {HEADS.map(([words, more], index) => (
                  <th key={words} scope="col" className={`py-1 pr-2 font-semibold sm:pr-3 ${index === 1 ? 'max-sm:hidden' : ''}`}>
                    {words}
                    <span className="max-sm:hidden">{more}</span>
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {rows.map(({ code, line }) => (
                <tr key={code} className="border-line border-t">
                  <th scope="row" className="py-1 pr-2 font-semibold whitespace-nowrap sm:pr-3">
                    {code}
                  </th>
                  {[line.ve, line.r1, line.r5, line.r7, line.r8].map((date, index) => (
                    // biome-ignore lint/suspicious/noArrayIndexKey: the columns are fixed.
                    <td key={index} className={`py-1 pr-2 whitespace-nowrap sm:pr-3 ${index === 0 ? 'max-sm:hidden' : ''}`}>
                      {date === null ? 'not reached' : formatDay(date)}
                    </td>
                  ))}
                  <td className="py-1 pr-3 whitespace-nowrap">{formatPercent(line.freeze.chanceBeforeR7)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </details>
      <p className="mt-1 text-[0.9em] text-mute">
        First 28 °F: half of years by {formatDay(isoDateOfDay(season.year, season.climate.firstKillingFreezeDayOfYear))}, give or
        take {season.climate.freezeStandardDeviationDays} days. Stages by CROPGRO-Soybean phase lengths (DSSAT Foundation),{' '}
        {season.parameters} parameters.
      </p>
    </section>
  );
}

interface Scale {
  x: (day: number) => number;
  dayOf: (date: string | null) => number;
  shape: Shape;
  height: number;
}

function Chart({
  rows,
  season,
  first,
  last,
  shape,
  className,
}: {
  rows: Row[];
  season: SeasonContext;
  first: number;
  last: number;
  shape: Shape;
  className: string;
}) {
  const scale: Scale = {
    shape,
    height: shape.top + rows.length * shape.row + 16,
    x: (day) => shape.left + ((day - first) / (last - first)) * (shape.width - shape.left - 8),
    dayOf: (date) => (date === null ? last : dayOfYear(date) + (Number(date.slice(0, 4)) - season.year) * 365),
  };
  return (
    <svg viewBox={`0 0 ${shape.width} ${scale.height}`} className={`mt-1 w-full ${className}`} aria-hidden="true">
      <MonthLines first={first} scale={scale} year={season.year} />
      <FreezeShape season={season} first={first} last={last} scale={scale} />
      {rows.map((row, index) => (
        <SeasonBar key={row.code} row={row} y={shape.top + index * shape.row} scale={scale} named={index === 0} />
      ))}
    </svg>
  );
}

function MonthLines({ first, scale, year }: { first: number; scale: Scale; year: number }) {
  const months = MONTHS.map((name, index) => ({
    name,
    day: dayOfYear(`${year}-${String(index + 1).padStart(2, '0')}-01`),
  })).filter((month) => month.day >= first && scale.x(month.day) < scale.shape.width - 32);
  return months.map((month) => (
    <g key={month.name}>
      <line x1={scale.x(month.day)} x2={scale.x(month.day)} y1={16} y2={scale.height - 10} stroke="#d9cfb9" />
      <text x={scale.x(month.day) + 3} y={11} fontSize="12" fill="#6a6055">
        {month.name}
      </text>
    </g>
  ));
}

function FreezeShape({ season, first, last, scale }: { season: SeasonContext; first: number; last: number; scale: Scale }) {
  const base = scale.height - 10;
  const points = freezeCurve(season.climate, first, last)
    .filter((one) => one.chanceBy > 0.001)
    .map((one) => `${scale.x(one.day).toFixed(1)},${(base - one.chanceBy * (base - 20)).toFixed(1)}`);
  if (points.length < 2) return null;
  const start = points[0]?.split(',')[0];
  return (
    <g>
      <polygon points={`${start},${base} ${points.join(' ')} ${scale.x(last)},${base}`} fill="#dfe5f0" />
      <text x={scale.shape.width - 12} y={base - 5} fontSize="11.5" fill="#4a5a80" textAnchor="end">
        {scale.shape.nameAbove ? '28 °F freeze' : 'chance of 28 °F by then'}
      </text>
    </g>
  );
}

function SeasonBar({ row, y, scale, named }: { row: Row; y: number; scale: Scale; named: boolean }) {
  const { line, code } = row;
  const { x, dayOf, shape } = scale;
  const parts = [
    { from: line.planted, to: line.r1, fill: '#b9d0b9' },
    { from: line.r1, to: line.r5, fill: '#7ea583' },
    { from: line.r5, to: line.r7, fill: '#3f6f4a' },
  ];
  const r7 = dayOf(line.r7);
  const barY = shape.nameAbove ? y + 8 : y + 4;
  const stages = [
    { name: 'R1', date: line.r1 },
    { name: 'R5', date: line.r5 },
  ];
  return (
    <g>
      <text x={0} y={shape.nameAbove ? y : barY + 10} fontSize="13" fontWeight="700" fill="#221d17">
        {code}
      </text>
      {parts.map((part) => (
        <rect
          key={part.fill}
          x={x(dayOf(part.from))}
          y={barY}
          width={Math.max(0, x(dayOf(part.to)) - x(dayOf(part.from)))}
          height={11}
          fill={part.fill}
        />
      ))}
      {named
        ? stages.map(({ name, date }) =>
            date ? (
              <text key={name} x={x(dayOf(date))} y={barY - 4} fontSize="11" fill="#221d17" textAnchor="middle">
                {shape.nameAbove ? name : `${name} ${formatDay(date)}`}
              </text>
            ) : null,
          )
        : null}
      {line.r7 ? (
        <>
          <line
            x1={x(r7 - R7_SPREAD_DAYS)}
            x2={x(r7 + R7_SPREAD_DAYS)}
            y1={barY + 5.5}
            y2={barY + 5.5}
            stroke="#221d17"
            strokeWidth={1.5}
          />
          <text x={x(r7)} y={barY - 4} fontSize="11" fill="#221d17" textAnchor={shape.nameAbove ? 'middle' : 'start'}>
            R7 {formatDay(line.r7)}
          </text>
        </>
      ) : null}
      {line.r8 ? (
        <line x1={x(dayOf(line.r8))} x2={x(dayOf(line.r8))} y1={barY} y2={barY + 11} stroke="#3f6f4a" strokeWidth={2} />
      ) : null}
    </g>
  );
}
