'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { sendFiles } from '@/lib/upload';

export interface KeptImport {
  uploadId: string;
  words: string;
}

export interface SoilImportActions<Inspection> {
  inspect: (input: unknown) => Promise<Outcome<Inspection>>;
  keep: (input: unknown) => Promise<Outcome<{ words: string }>>;
  undo: (uploadId: string) => Promise<Outcome<{ count: number }>>;
  discard: (uploadId: string) => Promise<Outcome<null>>;
}

/** The steps every soil import goes through: send → check (again with other choices) → keep, or put away. */
export function useSoilImport<Inspection>(
  kind: 'soil-tests' | 'soil-survey',
  operationId: string,
  actions: SoilImportActions<Inspection>,
) {
  const router = useRouter();
  const [sending, setSending] = useState<{ done: number; total: number } | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [checked, setChecked] = useState<{ uploadId: string; inspection: Inspection; turn: number } | null>(null);
  const [kept, setKept] = useState<KeptImport | null>(null);
  const [pending, startTransition] = useTransition();
  const fail = (outcome: { problems: { message: string }[] }) => setProblems(outcome.problems.map((problem) => problem.message));

  function inspect(uploadId: string, extra: Record<string, unknown> = {}) {
    startTransition(async () => {
      setProblems([]);
      const outcome = await actions.inspect({ uploadId, ...extra });
      if (outcome.ok) setChecked((before) => ({ uploadId, inspection: outcome.value, turn: (before?.turn ?? 0) + 1 }));
      else {
        setChecked(null);
        fail(outcome);
        router.refresh();
      }
    });
  }

  async function choose(files: File[]) {
    setProblems([]);
    setKept(null);
    setChecked(null);
    setSending({ done: 0, total: files.reduce((sum, file) => sum + file.size, 0) });
    const outcome = await sendFiles({ kind, operationId }, files, (done, total) => setSending({ done, total }));
    setSending(null);
    if (outcome.ok) inspect(outcome.value.uploadId);
    else fail(outcome);
  }

  function keep(extra: Record<string, unknown> = {}) {
    if (!checked) return;
    startTransition(async () => {
      setProblems([]);
      const outcome = await actions.keep({ uploadId: checked.uploadId, ...extra });
      if (!outcome.ok) return fail(outcome);
      setKept({ uploadId: checked.uploadId, words: outcome.value.words });
      setChecked(null);
      router.refresh();
    });
  }

  function undo() {
    if (!kept) return;
    startTransition(async () => {
      setProblems([]);
      const outcome = await actions.undo(kept.uploadId);
      if (outcome.ok) setKept(null);
      else fail(outcome);
      router.refresh();
    });
  }

  function discard() {
    if (!checked) return;
    startTransition(async () => {
      await actions.discard(checked.uploadId);
      setChecked(null);
      router.refresh();
    });
  }

  return { sending, problems, checked, kept, pending, inspect, choose, keep, undo, discard };
}
