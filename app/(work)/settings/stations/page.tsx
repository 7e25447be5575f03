import type { Metadata } from 'next';
import { requireViewer } from '@/features/accounts/viewer';
import { addStations, deleteStation } from '@/features/placement/actions';
import { STATIONS } from '@/features/placement/climate/normals';
import { StationFile } from '@/features/placement/components/station-file';
import { StationTable } from '@/features/placement/components/station-table';
import { stationsOf } from '@/features/placement/queries';
import { found } from '@/lib/found';
import { Caution, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Weather stations' };

export default async function StationsPage() {
  const viewer = await requireViewer();
  const added = await found(stationsOf(viewer));
  return (
    <Page>
      <PageHeader title="Weather stations" />
      <p className="mb-4 max-w-prose">
        Season lines and freeze chances come from 30-year normals of up to six stations nearest to a field, near ones counting
        most. Hilum carries {STATIONS.length} of them. Add one that stands closer to your fields.
      </p>
      <div className="grid gap-6 lg:grid-cols-[minmax(0,24rem)_minmax(0,1fr)]">
        <StationFile add={addStations} />
        <section aria-labelledby="added">
          <h2 id="added" className="mb-2 text-lg">
            Added by {viewer.dealershipName}
          </h2>
          {added.length === 0 ? (
            <p className="border border-line border-dashed bg-paper px-4 py-5 text-mute">
              None yet. Fields take the stations that Hilum carries.
            </p>
          ) : (
            <StationTable caption="Added stations" stations={added} remove={deleteStation} />
          )}
        </section>
      </div>
      <details className="mt-6 border border-line bg-paper p-4">
        <summary className="cursor-pointer font-display font-bold text-lg">The {STATIONS.length} stations Hilum carries</summary>
        <div className="pt-3">
          <StationTable caption="Stations Hilum carries" stations={STATIONS.map((station) => ({ id: station.id, station }))} />
        </div>
      </details>
      <Caution className="mt-4">
        Source: US Climate Normals 1991–2020, NOAA National Centers for Environmental Information. Temperatures are as published;
        a field is corrected to its own elevation where that is known.
      </Caution>
    </Page>
  );
}
