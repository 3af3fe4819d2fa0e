export type Given = { label: string; value: string; unit: string };

/** What the order comes to for this child, in six figures. */
export function GivesGrid({ figures }: { figures: readonly Given[] }) {
  return (
    <dl className="gives">
      {figures.map((figure) => (
        <div key={figure.label}>
          <dt>{figure.label}</dt>
          <dd>
            {figure.value}
            <span>{figure.unit}</span>
          </dd>
        </div>
      ))}
    </dl>
  );
}
