'use client';

import clsx from 'clsx';
import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { TextField } from '@/lib/ui/form';
import { OneButtonForm } from '@/lib/ui/one-button-form';
import { type MaturityZone, rangeWords } from '../zones';

/** Zones by maturity; each opens to be changed or deleted. */
export function ZoneList({
  zones,
  selected,
  onSelect,
  change,
  remove,
}: {
  zones: MaturityZone[];
  selected: string | null;
  onSelect: (id: string | null) => void;
  change: FormAction;
  remove: FormAction;
}) {
  return (
    <section aria-labelledby="zones">
      <h2 id="zones" className="mb-2 text-lg">
        Zones
      </h2>
      {zones.length === 0 ? (
        <p className="border border-line border-dashed bg-paper px-4 py-5 text-mute">
          No zone yet. Every field takes its RM from its latitude. Draw a zone, say one between two latitudes, or bring a file.
        </p>
      ) : (
        <ul className="border-line border-t bg-white">
          {zones.map((zone) => {
            const open = zone.id === selected;
            return (
              <li key={zone.id} className={clsx('border-line border-b', open && 'bg-bloom-light')}>
                <button
                  type="button"
                  aria-expanded={open}
                  onClick={() => onSelect(open ? null : zone.id)}
                  className="flex min-h-11 w-full items-baseline justify-between gap-4 px-3 py-2 text-left hover:bg-bloom-light"
                >
                  <span className="font-semibold">{zone.name}</span>
                  <span className="whitespace-nowrap">{rangeWords(zone)}</span>
                </button>
                {open ? (
                  <div className="flex flex-col gap-3 px-3 pb-3">
                    <ActionForm action={change} submit="Keep" hidden={{ zoneId: zone.id }} className="flex flex-col gap-3">
                      {(state) => (
                        <>
                          <TextField label="Name" name="name" defaultValue={zone.name} error={problemFor(state, 'name')} />
                          <div className="grid grid-cols-2 gap-3">
                            <TextField
                              label="RM from"
                              name="relativeMaturityFrom"
                              inputMode="decimal"
                              defaultValue={zone.relativeMaturityFrom}
                              error={problemFor(state, 'relativeMaturityFrom')}
                            />
                            <TextField
                              label="RM to"
                              name="relativeMaturityTo"
                              inputMode="decimal"
                              defaultValue={zone.relativeMaturityTo}
                              error={problemFor(state, 'relativeMaturityTo')}
                            />
                          </div>
                        </>
                      )}
                    </ActionForm>
                    <OneButtonForm
                      action={remove}
                      kind="danger"
                      label="Delete the zone"
                      describes={`Delete the zone ${zone.name}`}
                      hidden={{ zoneId: zone.id }}
                    />
                  </div>
                ) : null}
              </li>
            );
          })}
        </ul>
      )}
    </section>
  );
}
