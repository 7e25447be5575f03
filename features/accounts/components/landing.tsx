import { LinkButton } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { SeedTag } from '@/lib/ui/seed-tag';

/** The lines of a ledger as they are printed, without figures: those are worked out for a real field. */
const LEDGER = [
  { factor: 'freeze', name: 'Maturity and freeze', weighs: 'the season line to R7 against the killing freezes on record' },
  {
    factor: 'soil-ph',
    name: 'Soil pH',
    weighs: 'the share of the field outside the sweet spot, and what lime would bring back',
  },
  { factor: 'wet-feet', name: 'Wet feet', weighs: 'drainage against the variety’s field tolerance and Rps genes' },
  { factor: 'row-width', name: 'Row width', weighs: 'how soon this bush type closes these rows' },
] as const;

const STEPS = [
  {
    who: 'The grower',
    what: 'brings field boundaries and soil tests',
    gives: 'Acres measured on the ellipsoid, faults in the file named, pH mapped over each field.',
  },
  {
    who: 'The grower',
    what: 'says how each field is farmed',
    gives: 'What is unknown stays unknown and widens the band; nothing is guessed in silence.',
  },
  {
    who: 'Hilum',
    what: 'ranks the line-up, field by field',
    gives: 'Each pick opens a ledger in bushels, every line with its reason and its source.',
  },
  {
    who: 'The grower',
    what: 'sees what to fix first',
    gives: 'Lime, a tight layer, drainage: what costs the field bushels whatever is planted.',
  },
  {
    who: 'The rep',
    what: 'proposes a plan within supply',
    gives: 'Rates, units and seed lots follow from the picks. The grower agrees, or asks for a change.',
  },
  {
    who: 'The crew',
    what: 'opens one link on a phone',
    gives: 'Field, variety, rate, population, tag check. No account, nothing else.',
  },
] as const;

/** What Hilum is, for people who are not signed in. `colours` are those of the factors, as every ledger has them. */
export function Landing({ colours }: { colours: Record<(typeof LEDGER)[number]['factor'], string> }) {
  return (
    <main id="main">
      <div className="mx-auto grid max-w-[84rem] gap-x-16 gap-y-16 px-4 pt-10 pb-14 lg:grid-cols-[minmax(0,1.15fr)_minmax(0,1fr)] lg:px-10 lg:pt-20 lg:pb-20">
        <div className="self-center">
          <h1 className="text-[2.5rem] leading-[1.04] tracking-tight sm:text-[3.25rem] lg:text-[4.1rem]">
            The right variety on the right field, before seed is booked.
          </h1>
          <p className="mt-6 max-w-[36rem] text-lg leading-relaxed lg:text-xl">
            Hilum reads a soybean field’s boundary, its soil tests and how it is farmed, ranks your dealership’s line-up for it,
            and says why in bushels per acre.
          </p>
          <div className="mt-8 flex flex-wrap items-center gap-x-5 gap-y-3">
            <LinkButton href="/sign-in" kind="action" className="px-7 text-lg lg:min-h-12">
              Sign in
            </LinkButton>
            <p className="max-w-64 text-mute">Accounts come by invitation from your seed dealership.</p>
          </div>
        </div>
        <SeedTag
          heading="A pick, as its ledger reads"
          note="bushels per acre, on one field, in one season"
          className="self-center"
        >
          <table className="w-full border-collapse text-left">
            <caption className="sr-only">The lines of a ledger and what each weighs</caption>
            <tbody>
              <tr className="border-line border-b">
                <th scope="row" className="py-3 pr-3 font-bold">
                  What this field can carry
                  <span className="block font-normal text-mute">from its own yields, its goal, or its county</span>
                </th>
                <td className="w-8 py-3 text-right text-leaf font-bold">
                  <span aria-hidden="true">+</span>
                  <span className="sr-only">added</span>
                </td>
              </tr>
              {LEDGER.map((line) => (
                <tr key={line.name} className="border-line border-b">
                  <th scope="row" className="py-3 pr-3 font-normal">
                    <span className="flex gap-3">
                      <span aria-hidden="true" className="mt-1 size-3 shrink-0" style={{ background: colours[line.factor] }} />
                      <span>
                        <span className="font-semibold">{line.name}</span>
                        <span className="block text-mute">{line.weighs}</span>
                      </span>
                    </span>
                  </th>
                  <td className="w-8 py-3 text-right">
                    <span aria-hidden="true">−</span>
                    <span className="sr-only">taken off</span>
                  </td>
                </tr>
              ))}
              <tr className="border-ink border-t-2">
                <th scope="row" className="pt-3 pr-3 font-bold font-display text-lg">
                  Expected
                  <span className="block font-normal font-sans text-base text-mute lg:text-sm">
                    with its band, and a source on every line
                  </span>
                </th>
                <td className="w-8 pt-3 text-right font-bold">
                  <span aria-hidden="true">=</span>
                  <span className="sr-only">the sum</span>
                </td>
              </tr>
            </tbody>
          </table>
        </SeedTag>
      </div>
      <section aria-labelledby="season" className="border-line border-y bg-paper">
        <div className="mx-auto max-w-[84rem] px-4 py-12 lg:px-10 lg:py-16">
          <h2 id="season" className="text-[1.75rem] lg:text-[2.1rem]">
            A season, from the boundary file to the planter
          </h2>
          <ol className="mt-7 grid border-ink border-t-2 lg:grid-cols-2 lg:gap-x-16">
            {STEPS.map((step, index) => (
              <li key={step.what} className="grid grid-cols-[2.5rem_1fr] gap-x-4 border-line border-b py-5">
                <span aria-hidden="true" className="font-bold font-display text-[2rem] text-bloom leading-none">
                  {index + 1}
                </span>
                <span>
                  <span className="block font-bold font-display text-lg leading-snug">
                    {step.who} {step.what}
                  </span>
                  <span className="mt-1 block text-mute">{step.gives}</span>
                </span>
              </li>
            ))}
          </ol>
        </div>
      </section>
      <footer className="mx-auto grid max-w-[84rem] gap-x-16 gap-y-6 px-4 py-10 text-mute lg:grid-cols-[minmax(0,1fr)_minmax(0,2fr)] lg:px-10">
        <p>The hilum is the seed’s eye: its scar where it hung in the pod.</p>
        <ul className="grid gap-x-10 gap-y-2 sm:grid-cols-2">
          {Object.values(CAUTIONS).map((caution) => (
            <li key={caution}>{caution}</li>
          ))}
        </ul>
      </footer>
    </main>
  );
}
