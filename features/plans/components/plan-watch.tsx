'use client';

import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { Button } from '@/lib/ui/button';
import { Notice } from '@/lib/ui/page';
import { QueryProvider } from '@/lib/ui/query-provider';

/** How often an open plan looks whether somebody else changed it. */
const LOOK_EVERY_MILLISECONDS = 20_000;

/** Tells when somebody else changed the plan that is open here, before an edit meets the change. */
export function PlanWatch(props: { operationId: string; season: number; revision: number }) {
  return (
    <QueryProvider>
      <Watch {...props} />
    </QueryProvider>
  );
}

function Watch({ operationId, season, revision }: { operationId: string; season: number; revision: number }) {
  const router = useRouter();
  const { data } = useQuery({
    queryKey: ['plan', operationId, season],
    queryFn: async (): Promise<{ revision: number; state: string } | null> => {
      const response = await fetch(`/api/v1/plans/${operationId}/${season}`);
      return response.ok ? response.json() : null;
    },
    refetchInterval: LOOK_EVERY_MILLISECONDS,
  });
  if (!data || data.revision <= revision) return null;
  return (
    <Notice kind="attention">
      <p className="flex flex-wrap items-center gap-3">
        This plan was changed while you had it open; it is {data.state} now.
        <Button small onClick={() => router.refresh()}>
          Show it as it is now
        </Button>
      </p>
    </Notice>
  );
}
