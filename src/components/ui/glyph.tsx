import type { GlyphName } from '@shared/gauge/glyphs';
import { glyphShapes } from '@shared/gauge/glyphs';

type GlyphProps = { name: GlyphName; size?: 'text' | 'verdict'; className?: string };

/** A sign beside a word; it is never the only thing that says it. */
export function Glyph({ name, size = 'text', className = '' }: GlyphProps) {
  const classes = ['g', size === 'verdict' ? 'verdict' : '', className].filter(Boolean).join(' ');
  return (
    <svg className={classes} viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      {glyphShapes(name).map((shape) => (
        <path
          key={shape.d}
          d={shape.d}
          fill={shape.filled || shape.solid ? 'currentColor' : undefined}
          stroke={shape.filled ? 'none' : undefined}
          strokeWidth={shape.width}
          strokeLinecap={shape.butt ? 'butt' : undefined}
          strokeDasharray={shape.dash}
          strokeDashoffset={shape.dashOffset}
        />
      ))}
    </svg>
  );
}
