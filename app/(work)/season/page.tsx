import { requireViewer } from '@/features/accounts/viewer';
import { SeasonAgreements, SeasonMaturities, SeasonSupply } from '@/features/plans/components/season-tables';
import { seasonOf } from '@/features/plans/queries';
import { formatAcres, formatNumber } from '@/lib/format';
import { found } from '@/lib/found';
import { LinkButton } from '@/lib/ui/button';
import { Caution, Figure, Page, PageHeader } from '@/lib/ui/page';

export const metadata = { title: 'Season' };

/** The season at a glance: seed asked against seed held, acres by maturity, who has not agreed. */
export default async function SeasonPage() {
  const viewer = await requireViewer();
  const book = await found(seasonOf(viewer, viewer.season));
  const { totals } = book;
  return (
    <Page>
      <PageHeader
        title={`${book.season} season`}
        aside={
          <div className="flex flex-wrap gap-x-7 gap-y-2">
            <Figure value={`${formatAcres(totals.acresPlaced)}`} label={`of ${formatAcres(totals.acres)} acres placed`} />
            <Figure value={`${totals.agreed} of ${totals.agreed + totals.notAgreed}`} label="plans agreed" />
            <Figure value={formatNumber(totals.unitsAgreed)} label="units agreed" />
            <Figure value={formatNumber(totals.unitsProposed)} label="units proposed" />
          </div>
        }
        actions={
          <LinkButton href="/api/v1/season/export" download>
            CSV
          </LinkButton>
        }
      />
      <div className="grid items-start gap-8 lg:grid-cols-[minmax(0,1fr)_26rem]">
        <SeasonSupply book={book} />
        <div className="flex flex-col gap-8">
          <SeasonAgreements book={book} />
          <SeasonMaturities book={book} />
        </div>
      </div>
      <Caution className="mt-5">
        Units are counted over the whole dealership; acres and operations are those you serve. A proposed plan holds its seed, an
        agreed one reserves it; first come, first served. A plan that is taken back or asked to change frees it.
      </Caution>
    </Page>
  );
}
