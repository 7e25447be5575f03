'use client';

import { useRouter } from 'next/navigation';

/** Chooses the operation a page looks at; the choice is in the address. Nothing to choose, nothing shown. */
export function OperationSwitch({
  operations,
  chosenId,
  path,
}: {
  operations: { id: string; name: string }[];
  chosenId: string;
  path: string;
}) {
  const router = useRouter();
  if (operations.length < 2) return null;
  return (
    <label className="flex items-center gap-2">
      <span className="font-semibold">Operation</span>
      <select
        className="min-h-11 border border-ink bg-white px-3 lg:min-h-9"
        value={chosenId}
        onChange={(event) => router.push(`${path}?operation=${event.target.value}`)}
      >
        {operations.map((operation) => (
          <option key={operation.id} value={operation.id}>
            {operation.name}
          </option>
        ))}
      </select>
    </label>
  );
}
