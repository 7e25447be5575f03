/** A key to a map: a colour, and a word or number that says the same. */
export function Legend({ title, items }: { title: string; items: readonly { color: string; label: string; note?: string }[] }) {
  return (
    <div className="border border-line bg-paper px-3 py-2 text-[13px]">
      <p className="mb-1 font-semibold">{title}</p>
      <ul className="flex flex-wrap gap-x-3 gap-y-1">
        {items.map((item) => (
          <li key={item.label} className="flex items-center gap-1.5">
            <span aria-hidden="true" className="inline-block size-3 border border-ink/40" style={{ background: item.color }} />
            <span>
              {item.label}
              {item.note ? <span className="text-mute"> {item.note}</span> : null}
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}
