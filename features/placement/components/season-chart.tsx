import { dayOfYear, formatDay, isoDateOfDay } from '@/lib/dates';
import { formatPercent } from '@/lib/format';
import { freezeCurve } from '../climate/freeze';
import { seasonLine } from '../climate/season-line';
import type { SeasonContext } from '../engine/model';

const WIDTH = 760;
const LEFT = 74;
const ROW = 30;
const TOP = 26;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
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
}: {
  picks: { code: string; relativeMaturity: number }[];
  season: SeasonContext;
  plantingDate: string;
}) {
  const rows: Row[] = picks.map(({ code, relativeMaturity }) => ({
    code,
    line: seasonLine({ climate: season.climate, relativeMaturity, plantingDate, parameters: season.parameters }),
  }));
  const first = dayOfYear(plantingDate) - 8;
  const last = Math.max(dayOfYear(`${season.year}-11-05`), season.climate.firstKillingFreezeDayOfYear + 12);
  const x = (day: number) => LEFT + ((day - first) / (last - first)) * (WIDTH - LEFT - 12);
  const dayOf = (date: string | null) =>
    date === null ? last : dayOfYear(date) + (Number(date.slice(0, 4)) - season.year) * 365;
  const height = TOP + rows.length * ROW + 18;
  const nearest = season.climate.stations[0];
  return (
    <section aria-labelledby="season-line">
      <h2 id="season-line" className="text-[1.1em]">
        Season line{' '}
        <span className="font-normal font-sans text-mute text-[0.85em]">
          planted {formatDay(plantingDate)} ·{' '}
          {season.climate.source === 'normals' ? '30-year normals' : `weather of ${season.year}`}
          {nearest ? `, nearest station ${nearest.name}, ${Math.round(nearest.distanceMiles)} mi` : ''}
        </span>
      </h2>
      <div className="overflow-x-auto">
        <svg viewBox={`0 0 ${WIDTH} ${height}`} className="mt-1 w-full min-w-[34rem]" aria-hidden="true">
          <MonthLines first={first} last={last} x={x} height={height} year={season.year} />
          <FreezeShape season={season} first={first} last={last} x={x} height={height} />
          {rows.map((row, index) => (
            <SeasonBar key={row.code} row={row} y={TOP + index * ROW} x={x} dayOf={dayOf} />
          ))}
        </svg>
      </div>
      <div className="overflow-x-auto">
        <table className="w-full text-left text-[0.92em]">
          <caption className="sr-only">Stages of the first picks and the chance of a killing freeze</caption>
          <thead>
            <tr className="text-mute">
              {['Pick', 'Up', 'R1 flower', 'R5 seed', 'R7 ± 5 d', 'R8 ripe', 'Freeze before R7'].map((words) => (
                <th key={words} scope="col" className="py-1 pr-3 font-semibold whitespace-nowrap">
                  {words}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ code, line }) => (
              <tr key={code} className="border-line border-t">
                <th scope="row" className="py-1 pr-3 font-semibold whitespace-nowrap">
                  {code}
                </th>
                {[line.ve, line.r1, line.r5, line.r7, line.r8].map((date, index) => (
                  // biome-ignore lint/suspicious/noArrayIndexKey: the columns are fixed.
                  <td key={index} className="py-1 pr-3 whitespace-nowrap">
                    {date === null ? 'not reached' : formatDay(date)}
                  </td>
                ))}
                <td className="py-1 pr-3 whitespace-nowrap">{formatPercent(line.freeze.chanceBeforeR7)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <p className="mt-1 text-[0.9em] text-mute">
        First 28 °F: half of years by {formatDay(isoDateOfDay(season.year, season.climate.firstKillingFreezeDayOfYear))}, give or
        take {season.climate.freezeStandardDeviationDays} days. Stages by CROPGRO-Soybean phase lengths (DSSAT Foundation),{' '}
        {season.parameters} parameters.
      </p>
    </section>
  );
}

function MonthLines({
  first,
  last,
  x,
  height,
  year,
}: {
  first: number;
  last: number;
  x: (day: number) => number;
  height: number;
  year: number;
}) {
  const months = MONTHS.map((name, index) => ({
    name,
    day: dayOfYear(`${year}-${String(index + 1).padStart(2, '0')}-01`),
  })).filter((month) => month.day >= first && month.day < last);
  return months.map((month) => (
    <g key={month.name}>
      <line x1={x(month.day)} x2={x(month.day)} y1={18} y2={height - 12} stroke="#d9cfb9" />
      <text x={x(month.day) + 4} y={13} fontSize="12" fill="#6a6055">
        {month.name}
      </text>
    </g>
  ));
}

function FreezeShape({
  season,
  first,
  last,
  x,
  height,
}: {
  season: SeasonContext;
  first: number;
  last: number;
  x: (day: number) => number;
  height: number;
}) {
  const base = height - 12;
  const points = freezeCurve(season.climate, first, last)
    .filter((one) => one.chanceBy > 0.001)
    .map((one) => `${x(one.day).toFixed(1)},${(base - one.chanceBy * (base - 22)).toFixed(1)}`);
  if (points.length < 2) return null;
  const start = points[0]?.split(',')[0];
  return (
    <g>
      <polygon points={`${start},${base} ${points.join(' ')} ${x(last)},${base}`} fill="#dfe5f0" />
      <text x={WIDTH - 16} y={base - 5} fontSize="12" fill="#4a5a80" textAnchor="end">
        chance of 28 °F by then
      </text>
    </g>
  );
}

function SeasonBar({
  row,
  y,
  x,
  dayOf,
}: {
  row: Row;
  y: number;
  x: (day: number) => number;
  dayOf: (date: string | null) => number;
}) {
  const { line, code } = row;
  const parts = [
    { from: line.planted, to: line.r1, fill: '#b9d0b9' },
    { from: line.r1, to: line.r5, fill: '#7ea583' },
    { from: line.r5, to: line.r7, fill: '#3f6f4a' },
  ];
  const r7 = dayOf(line.r7);
  return (
    <g>
      <text x={0} y={y + 14} fontSize="13" fontWeight="700" fill="#221d17">
        {code}
      </text>
      {parts.map((part) => (
        <rect
          key={part.fill}
          x={x(dayOf(part.from))}
          y={y + 5}
          width={Math.max(0, x(dayOf(part.to)) - x(dayOf(part.from)))}
          height={10}
          fill={part.fill}
        />
      ))}
      {line.r7 ? (
        <>
          <line
            x1={x(r7 - R7_SPREAD_DAYS)}
            x2={x(r7 + R7_SPREAD_DAYS)}
            y1={y + 10}
            y2={y + 10}
            stroke="#221d17"
            strokeWidth={1.5}
          />
          <text x={x(r7) + 8} y={y + 3} fontSize="11" fill="#221d17">
            R7 {formatDay(line.r7)}
          </text>
        </>
      ) : null}
    </g>
  );
}
