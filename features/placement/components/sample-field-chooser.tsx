'use client';

import { useRouter } from 'next/navigation';

/** The field that shows what a rule does; kept in the address. */
export function SampleFieldChooser({
  fields,
  chosenId,
}: {
  fields: { id: string; name: string; operationName: string }[];
  chosenId: string;
}) {
  const router = useRouter();
  const operations = [...new Set(fields.map((field) => field.operationName))];
  return (
    <label className="mb-4 flex flex-wrap items-center gap-2">
      <span className="font-semibold">Try them on</span>
      <select
        value={chosenId}
        onChange={(event) => router.push(`/settings/rules?field=${event.target.value}`, { scroll: false })}
        className="min-h-11 border border-ink/40 bg-white px-2 lg:min-h-9"
      >
        {operations.map((operation) => (
          <optgroup key={operation} label={operation}>
            {fields
              .filter((field) => field.operationName === operation)
              .map((field) => (
                <option key={field.id} value={field.id}>
                  {field.name}
                </option>
              ))}
          </optgroup>
        ))}
      </select>
    </label>
  );
}
