'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/button';
import { TextAreaField, TextField } from '@/lib/ui/form';
import type { SheetBlock } from '../sheet';
import type { Mark } from './use-marks';

/** Longest side of a photo that is kept, pixels. */
const PHOTO_PIXELS = 1280;

/** Marks a field planted: the day, and where they differ the lot and the acres, a note and a photo of the tag. */
export function MarkForm({ block, onMark }: { block: SheetBlock; onMark: (mark: Omit<Mark, 'id' | 'sent'>) => void }) {
  const [open, setOpen] = useState(false);
  const [photo, setPhoto] = useState<string | null>(null);
  if (!open) {
    return (
      <Button kind="action" className="mt-4 min-h-14! w-full text-xl" onClick={() => setOpen(true)}>
        Mark planted
      </Button>
    );
  }
  return (
    <form
      className="mt-4 flex flex-col gap-4 border-t border-line pt-4"
      onSubmit={(event) => {
        event.preventDefault();
        const form = new FormData(event.currentTarget);
        const acres = Number(form.get('areaAcres'));
        onMark({
          rowId: block.rowId,
          plantedOn: String(form.get('plantedOn')),
          lotNumber: String(form.get('lotNumber')).trim() || null,
          areaAcres: acres > 0 ? acres : null,
          note: String(form.get('note')).trim() || null,
          photo,
        });
        setOpen(false);
      }}
    >
      <TextField name="plantedOn" type="date" label="Day" defaultValue={localDay()} required />
      <TextField name="lotNumber" label="Lot on the tag" defaultValue={block.lotNumber ?? ''} />
      <TextField name="areaAcres" label="Acres planted" unit="ac" inputMode="decimal" defaultValue={block.areaAcres.toFixed(1)} />
      <TextAreaField name="note" label="Note" />
      <label className="flex flex-col gap-1">
        <span className="font-semibold">Photo of the tag</span>
        <input
          type="file"
          accept="image/*"
          capture="environment"
          className="min-h-11"
          onChange={async (event) => {
            const file = event.target.files?.[0];
            setPhoto(file ? await smallPhoto(file) : null);
          }}
        />
      </label>
      <div className="flex gap-3">
        <Button type="submit" kind="action" className="min-h-14! flex-1 text-xl">
          Planted
        </Button>
        <Button className="min-h-14!" onClick={() => setOpen(false)}>
          Not yet
        </Button>
      </div>
    </form>
  );
}

/** Today by the phone's own clock. */
function localDay(): string {
  const now = new Date();
  return `${now.getFullYear()}-${String(now.getMonth() + 1).padStart(2, '0')}-${String(now.getDate()).padStart(2, '0')}`;
}

/** The picture as a JPEG small enough to wait on a phone; `null` when it cannot be read. */
async function smallPhoto(file: File): Promise<string | null> {
  try {
    const picture = await createImageBitmap(file);
    const scale = Math.min(1, PHOTO_PIXELS / Math.max(picture.width, picture.height));
    const canvas = document.createElement('canvas');
    canvas.width = Math.round(picture.width * scale);
    canvas.height = Math.round(picture.height * scale);
    canvas.getContext('2d')?.drawImage(picture, 0, 0, canvas.width, canvas.height);
    return canvas.toDataURL('image/jpeg', 0.7);
  } catch {
    return null;
  }
}
