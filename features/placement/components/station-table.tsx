import { formatDay, isoDateOfDay } from '@/lib/dates';
import { formatNumber } from '@/lib/format';
import type { FormAction } from '@/lib/ui/action-form';
import { OneButtonForm } from '@/lib/ui/one-button-form';
import { Table, Td, Th } from '@/lib/ui/table';
import type { Station } from '../climate/normals';

/** Any year of 365 days: the table shows days of a usual year. */
const USUAL_YEAR = 2027;

/** Stations with what the season line takes from them. `remove` only for those the dealership added. */
export function StationTable({
  caption,
  stations,
  remove,
}: {
  caption: string;
  stations: { id: string; station: Station; miles?: number }[];
  remove?: FormAction;
}) {
  return (
    <Table caption={caption}>
      <thead>
        <tr>
          <Th>Station</Th>
          <Th numeric>Latitude</Th>
          <Th numeric>Longitude</Th>
          <Th numeric>Elevation ft</Th>
          <Th numeric>July high / low °F</Th>
          <Th>First 28 °F, median</Th>
          {remove ? <Th>Take out</Th> : null}
        </tr>
      </thead>
      <tbody>
        {stations.map(({ id, station }) => (
          <tr key={id}>
            <Td>
              <b>{station.name}</b> <span className="block text-[0.9em] text-mute">{station.id}</span>
            </Td>
            <Td numeric>{formatNumber(station.latitude, 2)}</Td>
            <Td numeric>{formatNumber(station.longitude, 2)}</Td>
            <Td numeric>{formatNumber(station.elevationFt)}</Td>
            <Td numeric>
              {formatNumber(station.monthlyMaximumF[6], 1)} / {formatNumber(station.monthlyMinimumF[6], 1)}
            </Td>
            <Td>
              {station.firstKillingFreezeDayOfYear === null
                ? 'not published; taken from others nearby'
                : formatDay(isoDateOfDay(USUAL_YEAR, station.firstKillingFreezeDayOfYear))}
            </Td>
            {remove ? (
              <Td>
                <OneButtonForm
                  action={remove}
                  kind="danger"
                  label="Take out"
                  describes={`Take out ${station.name}`}
                  hidden={{ stationId: id }}
                />
              </Td>
            ) : null}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
