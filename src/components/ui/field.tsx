import type { ReactNode } from 'react';
import { useId } from 'react';
import type { GlyphName } from '@shared/gauge/glyphs';
import { Glyph } from './glyph';

/** What every field can say about itself. */
export type FieldNotes = {
  label: ReactNode;
  /** Keeps the label for those who cannot see the layout that replaces it. */
  labelHidden?: boolean;
  hint?: ReactNode;
  /** What is wrong and what would be right. */
  error?: ReactNode;
  /** Where the page says the error elsewhere, once for several fields: the id of that text. */
  errorId?: string;
  /** The error is a ceiling, not a malformed entry. */
  overBrim?: boolean;
  caution?: ReactNode;
  /** Width classes of the row: w, w2, w3, w4, w5, m, b, fix, full. */
  width?: string;
};

/** The attributes that tie a control to its label and messages. */
export type FieldWiring = {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
};

type FieldProps = FieldNotes & {
  id?: string;
  /** A control made of several: the label is a caption, not a <label>. */
  caption?: boolean;
  children: (wiring: FieldWiring, labelId: string) => ReactNode;
};

/** The class of a field's box: its edge says caution or refusal. */
export const boxClass = (notes: Pick<FieldNotes, 'error' | 'caution'>, ...more: (string | false)[]): string =>
  ['in', ...more, notes.error ? 'bad' : notes.caution ? 'warn' : ''].filter(Boolean).join(' ');

type MessageProps = { id: string; glyph: GlyphName; alert?: boolean; tone?: string; children: ReactNode };

function Message({ id, glyph, alert = false, tone = '', children }: MessageProps) {
  return (
    <p className={`err ${tone}`.trim()} id={id} role={alert ? 'alert' : undefined}>
      <Glyph name={glyph} />
      <span>{children}</span>
    </p>
  );
}

type MessagesProps = Pick<FieldNotes, 'error' | 'errorId' | 'overBrim' | 'caution' | 'hint'> & {
  at: (part: string) => string;
};

function Messages({ at, error, errorId, overBrim, caution, hint }: MessagesProps) {
  return (
    <>
      {error && !errorId && (
        <Message id={at('error')} glyph={overBrim ? 'brim' : 'refused'} alert>
          {error}
        </Message>
      )}
      {caution && (
        <Message id={at('caution')} glyph="caution" tone="c-ochre">
          {caution}
        </Message>
      )}
      {hint && (
        <p className="note" id={at('hint')}>
          {hint}
        </p>
      )}
    </>
  );
}

/** Label over the control, messages under it, both tied to it. */
export function Field({ id, caption = false, children, width = '', ...notes }: FieldProps) {
  const ownId = useId();
  const fieldId = id ?? ownId;
  const { label, labelHidden = false, hint, error, errorId, overBrim, caution } = notes;
  const at = (part: string) => `${fieldId}-${part}`;
  const described = [error && (errorId ?? at('error')), caution && at('caution'), hint && at('hint')].filter(
    Boolean,
  );
  const wiring: FieldWiring = {
    id: fieldId,
    'aria-describedby': described.length > 0 ? described.join(' ') : undefined,
    'aria-invalid': error ? true : undefined,
  };
  const labelling = { id: at('label'), className: labelHidden ? 'vh' : 'k' };
  return (
    <div className={`f ${width}`.trim()}>
      {caption ? (
        <span {...labelling}>{label}</span>
      ) : (
        <label {...labelling} htmlFor={fieldId}>
          {label}
        </label>
      )}
      {children(wiring, at('label'))}
      <Messages at={at} {...{ error, errorId, overBrim, caution, hint }} />
    </div>
  );
}
