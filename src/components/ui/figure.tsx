export type FigureSize = 'xl' | 'l' | 'm' | 'run' | 's' | 'row';

type FigureProps = {
  value: string;
  unit?: string;
  size?: FigureSize;
  tone?: 'ink' | 'brim' | 'tide' | 'plum';
  /** Not fresh: the figure greys, and the words say so. */
  stale?: boolean;
};

/** The printed parts of a number: no trailing zero, a true minus, the decimals apart. */
export function figureParts(value: string): { whole: string; decimals: string } {
  const [whole = '', decimals = ''] = value.replace(/^-/, '−').split('.');
  return { whole, decimals: decimals.replace(/0+$/, '') };
}

/** The dose. Decimals are smaller than the whole, so that 52.1 is never read as 521. */
export function Figure({ value, unit, size = 'xl', tone = 'ink', stale = false }: FigureProps) {
  const { whole, decimals } = figureParts(value);
  const Tag = size === 'row' ? 'span' : 'p';
  const classes = ['fig', size === 'xl' ? '' : size, tone === 'ink' ? '' : `c-${tone}`, stale ? 'stale' : ''];
  return (
    <Tag className={classes.filter(Boolean).join(' ')}>
      <span className="n">
        {whole}
        {decimals && <small>.{decimals}</small>}
      </span>
      {unit && <span className="u">{unit}</span>}
      {stale && <span className="st c-ochre sm">not current</span>}
    </Tag>
  );
}
