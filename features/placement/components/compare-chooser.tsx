'use client';

import { useRouter } from 'next/navigation';

/** Which varieties stand side by side: two to four, kept in the address. */
export function CompareChooser({
  path,
  chosen,
  picks,
}: {
  path: string;
  chosen: string[];
  picks: { varietyId: string; code: string }[];
}) {
  const router = useRouter();
  const go = (ids: string[]) =>
    router.push(`${path}?varieties=${[...new Set(ids.filter(Boolean))].join(',')}`, { scroll: false });
  return (
    <fieldset className="mb-4 flex flex-wrap items-end gap-3">
      <legend className="sr-only">Varieties compared</legend>
      {[...chosen, ...(chosen.length < 4 ? [''] : [])].map((id, index) => (
        <label key={id || 'more'} className="flex flex-col gap-1">
          <span className="font-semibold">{id ? `Variety ${index + 1}` : 'Add one'}</span>
          <select
            className="min-h-11 border border-ink/40 bg-white px-2 lg:min-h-9"
            value={id}
            onChange={(event) => go([...chosen.slice(0, index), event.target.value, ...chosen.slice(index + 1)])}
          >
            {id && chosen.length > 2 ? <option value="">(take out)</option> : null}
            {id ? null : <option value="">choose…</option>}
            {picks
              .filter((pick) => pick.varietyId === id || !chosen.includes(pick.varietyId))
              .map((pick) => (
                <option key={pick.varietyId} value={pick.varietyId}>
                  {pick.code}
                </option>
              ))}
          </select>
        </label>
      ))}
    </fieldset>
  );
}
