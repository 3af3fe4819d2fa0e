/** The first stop of the Tab key: past the bars to what matters (the page, or Stop). */
export function SkipLink({ to = 'main', children = 'Skip to the page' }: { to?: string; children?: string }) {
  return (
    <a className="skip" href={`#${to}`}>
      {children}
    </a>
  );
}
