'use client';

import { useCallback, useEffect, useRef, useState } from 'react';

export interface Mark {
  /** Made on the phone: the server keeps a mark once, however often it is sent. */
  id: string;
  rowId: string;
  plantedOn: string;
  lotNumber: string | null;
  areaAcres: number | null;
  note: string | null;
  photo: string | null;
  sent: boolean;
}

const RETRY_MILLISECONDS = 20_000;

function storeKey(token: string): string {
  // The end of the token tells sheets apart; the whole of it stays in the address alone.
  return `hilum-sheet-${token.slice(-8)}`;
}

function read(token: string): Mark[] {
  try {
    return JSON.parse(localStorage.getItem(storeKey(token)) ?? '[]') as Mark[];
  } catch {
    return [];
  }
}

/** Marks of this sheet: written to the phone first, sent when there is signal, struck off only when the server has them. */
export function useMarks(token: string) {
  const [marks, setMarks] = useState<Mark[]>([]);
  const [problem, setProblem] = useState<string | null>(null);
  const sending = useRef(false);

  const write = useCallback(
    (change: (now: Mark[]) => Mark[]): boolean => {
      const next = change(read(token));
      try {
        localStorage.setItem(storeKey(token), JSON.stringify(next));
      } catch {
        setProblem('This phone has no room left for the mark. Leave the photo out and try again.');
        return false;
      }
      setMarks(next);
      return true;
    },
    [token],
  );

  const send = useCallback(async () => {
    if (sending.current) return;
    sending.current = true;
    try {
      for (const mark of read(token).filter((one) => !one.sent)) {
        const { sent: _sent, ...body } = mark;
        let answer: Response;
        try {
          answer = await fetch(`/api/v1/sheet/${token}/planted`, {
            method: 'POST',
            headers: { 'Content-Type': 'application/json' },
            body: JSON.stringify(body),
          });
        } catch {
          return; // No signal: the mark waits.
        }
        if (answer.ok) {
          write((now) => now.map((one) => (one.id === mark.id ? { ...one, sent: true, photo: null } : one)));
          setProblem(null);
        } else {
          const words = await answer.json().catch(() => null);
          setProblem(words?.problems?.[0]?.message ?? 'The mark could not be sent. It stays on this phone.');
          return;
        }
      }
    } finally {
      sending.current = false;
    }
  }, [token, write]);

  useEffect(() => {
    setMarks(read(token));
    void send();
    const again = () => void send();
    const timer = setInterval(again, RETRY_MILLISECONDS);
    window.addEventListener('online', again);
    document.addEventListener('visibilitychange', again);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', again);
      document.removeEventListener('visibilitychange', again);
    };
  }, [token, send]);

  const add = useCallback(
    (mark: Omit<Mark, 'id' | 'sent'>) => {
      const id = `${Date.now().toString(36)}-${[...crypto.getRandomValues(new Uint8Array(12))].map((byte) => byte.toString(16).padStart(2, '0')).join('')}`;
      if (write((now) => [...now.filter((one) => one.rowId !== mark.rowId || one.sent), { ...mark, id, sent: false }]))
        void send();
    },
    [send, write],
  );

  return {
    marks: Object.fromEntries(marks.map((mark) => [mark.rowId, mark])) as Record<string, Mark>,
    waiting: marks.filter((mark) => !mark.sent).length,
    problem,
    add,
    send,
  };
}
