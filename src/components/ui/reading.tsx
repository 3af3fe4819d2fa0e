/** Loading: what is being read, over ruled blank lines. */
export function Reading({ what, lines = 5 }: { what: string; lines?: number }) {
  return (
    <div role="status" aria-busy="true">
      <ul className="ruled">
        <li>Reading {what}…</li>
        {Array.from({ length: lines - 1 }, (_, line) => (
          <li key={line} aria-hidden="true" />
        ))}
      </ul>
    </div>
  );
}
