'use client';

import clsx from 'clsx';
import { type ReactNode, useId, useState } from 'react';

/** A place to drop files, and a plain file button inside it for everyone else. */
export function FileDrop({
  label,
  accept,
  multiple = false,
  disabled = false,
  onFiles,
  children,
}: {
  label: string;
  accept: string;
  multiple?: boolean;
  disabled?: boolean;
  onFiles: (files: File[]) => void;
  children?: ReactNode;
}) {
  const [over, setOver] = useState(false);
  const id = useId();
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is a shortcut; the file button inside does the same by keyboard.
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setOver(false);
        if (!disabled && event.dataTransfer.files.length > 0) onFiles([...event.dataTransfer.files]);
      }}
      className={clsx('border-2 border-dashed px-5 py-7', over ? 'border-bloom bg-bloom-light' : 'border-line bg-paper')}
    >
      <label htmlFor={id} className="mb-2 block font-display font-bold text-lg">
        {label}
      </label>
      <input
        id={id}
        type="file"
        accept={accept}
        multiple={multiple}
        disabled={disabled}
        onChange={(event) => {
          const files = [...(event.target.files ?? [])];
          event.target.value = '';
          if (files.length > 0) onFiles(files);
        }}
        className="block w-full max-w-full file:mr-4 file:min-h-11 file:cursor-pointer file:border file:border-bloom file:bg-bloom file:px-4 file:font-semibold file:text-white"
      />
      {children ? <div className="mt-3 text-mute">{children}</div> : null}
    </div>
  );
}

/** A bar with counts: "412 of 1,180". */
export function ProgressBar({ done, total, words }: { done: number; total: number; words: string }) {
  const share = total > 0 ? Math.min(1, done / total) : 0;
  return (
    <div>
      <div className="mb-1" role="status">
        {words}
      </div>
      <div
        role="progressbar"
        aria-label={words}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={Math.round(share * 100)}
        className="h-2 bg-hull-deep"
      >
        <div className="h-2 bg-bloom" style={{ width: `${share * 100}%` }} />
      </div>
    </div>
  );
}
