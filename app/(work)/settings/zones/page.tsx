import type { Metadata } from 'next';
import { requireViewer } from '@/features/accounts/viewer';
import { fieldsOf } from '@/features/fields/queries';
import { operationsFor } from '@/features/growers/queries';
import { addZone, changeZone, deleteZone, inspectZones, keepZones } from '@/features/placement/actions';
import { ZoneBoard } from '@/features/placement/components/zone-board';
import { zonesOf } from '@/features/placement/queries';
import { found } from '@/lib/found';
import { configuredTiles } from '@/lib/map/tiles';
import { Caution, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Maturity zones' };

export default async function ZonesPage() {
  const viewer = await requireViewer();
  const zones = await found(zonesOf(viewer));
  const operations = await operationsFor(viewer);
  const fields = (await Promise.all(operations.map((operation) => fieldsOf(viewer, operation.id)))).flat();
  return (
    <Page>
      <PageHeader title="Maturity zones" />
      <p className="mb-4 max-w-prose">
        A field inside a zone takes the middle of the zone’s range as its best RM. Where zones lie over each other, the smaller
        one counts. A field outside all of them takes its RM from its latitude, its longitude and its elevation.
      </p>
      <ZoneBoard
        zones={zones}
        fields={fields.map((field) => ({ id: field.id, geometry: field.boundary }))}
        actions={{ add: addZone, change: changeZone, remove: deleteZone, inspect: inspectZones, keep: keepZones }}
        tiles={configuredTiles()}
      />
      <Caution className="mt-4">
        Zones are this dealership’s own. What they change shows on a field once it is scored again.
      </Caution>
    </Page>
  );
}
