'use client';

import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { CheckField, TextField } from '@/lib/ui/form';

/** One's own name and mail wishes. */
export function OwnAccountForm({ action, account }: { action: FormAction; account: { name: string; wantsMail: boolean } }) {
  return (
    <ActionForm action={action} submit="Keep" kind="plain">
      {(state) => (
        <>
          <TextField label="Name" name="name" autoComplete="name" defaultValue={account.name} error={problemFor(state, 'name')} />
          <CheckField
            label="Mail me at each step of a plan"
            hint="Proposed, agreed, change asked. Mail about your account and password always comes."
            name="wantsMail"
            defaultChecked={account.wantsMail}
          />
        </>
      )}
    </ActionForm>
  );
}

/** The dealership's name, the season being planned and the soybean price. */
export function DealershipForm({
  action,
  dealership,
}: {
  action: FormAction;
  dealership: { name: string; currentSeason: number; soybeanPriceCentsPerBushel: number };
}) {
  return (
    <ActionForm action={action} submit="Keep" kind="plain">
      {(state) => (
        <>
          <TextField label="Name" name="name" defaultValue={dealership.name} error={problemFor(state, 'name')} />
          <TextField
            label="Season being planned"
            hint="The crop year that fields, picks and plans are shown for. Earlier ones are kept."
            name="currentSeason"
            inputMode="numeric"
            defaultValue={dealership.currentSeason}
            error={problemFor(state, 'currentSeason')}
          />
          <TextField
            label="Soybean price"
            hint="For dollars on plans."
            name="soybeanPriceDollarsPerBushel"
            inputMode="decimal"
            unit="$/bu"
            defaultValue={(dealership.soybeanPriceCentsPerBushel / 100).toFixed(2)}
            error={problemFor(state, 'soybeanPriceDollarsPerBushel')}
          />
        </>
      )}
    </ActionForm>
  );
}
