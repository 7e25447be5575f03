'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { FileDrop, ProgressBar } from '@/lib/ui/file-drop';
import { Notice } from '@/lib/ui/page';
import { sendFiles } from '@/lib/upload';

/** Adds climate stations from NOAA's normals files as they are published. */
export function StationFile({ add }: { add: (uploadId: string) => Promise<Outcome<{ words: string }>> }) {
  const router = useRouter();
  const [sending, setSending] = useState<{ done: number; total: number } | null>(null);
  const [said, setSaid] = useState<Outcome<{ words: string }> | null>(null);
  const [pending, startTransition] = useTransition();

  async function choose(files: File[]) {
    setSaid(null);
    setSending({ done: 0, total: files.reduce((sum, file) => sum + file.size, 0) });
    const sent = await sendFiles({ kind: 'climate-stations', operationId: null }, files, (done, total) =>
      setSending({ done, total }),
    );
    setSending(null);
    if (!sent.ok) return setSaid(sent);
    startTransition(async () => {
      setSaid(await add(sent.value.uploadId));
      router.refresh();
    });
  }

  return (
    <div className="flex flex-col gap-3">
      {said?.ok ? (
        <Notice kind="good">
          <p>{said.value.words}</p>
          {said.notes?.map((note) => (
            <p key={note}>{note}</p>
          ))}
        </Notice>
      ) : null}
      {said && !said.ok ? (
        <Notice kind="error" title="Not kept">
          {said.problems.map((problem) => (
            <p key={problem.message}>{problem.message}</p>
          ))}
        </Notice>
      ) : null}
      <FileDrop label="Add stations" accept=".csv" multiple disabled={pending || sending !== null} onFiles={choose}>
        NOAA normals 1991–2020 as NCEI publishes them: the monthly CSV of a station, and its annual CSV for the freeze dates.
        Choose both together.
      </FileDrop>
      {sending ? <ProgressBar done={sending.done} total={sending.total} words="Sending the files" /> : null}
      {pending ? <p role="status">Reading the files…</p> : null}
    </div>
  );
}
