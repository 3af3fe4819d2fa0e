import type { ComponentProps, ReactNode } from 'react';
import { useId } from 'react';
import type { GlyphName } from '@shared/gauge/glyphs';
import { Glyph } from './glyph';

export type ButtonKind = 'primary' | 'secondary' | 'quiet' | 'plum' | 'stop' | 'go';

const CLASSES: Readonly<Record<ButtonKind, string>> = {
  primary: 'p',
  secondary: '',
  quiet: 'q',
  plum: 'plum',
  stop: 'stop',
  go: 'go',
};

/** The class of a button, for a link that looks like one. */
export const buttonClass = (kind: ButtonKind = 'secondary', small = false): string =>
  ['btn', CLASSES[kind], small ? 'sm' : ''].filter(Boolean).join(' ');

type ButtonProps = Omit<ComponentProps<'button'>, 'disabled'> & {
  kind?: ButtonKind;
  small?: boolean;
  glyph?: GlyphName;
  /** Why the button is shut and what opens it; null or undefined leaves it open. */
  shutReason?: ReactNode;
  /** Where the page already says the reason: the id of that text, so that it is not said twice. */
  reasonId?: string;
  busy?: boolean;
  /** The words while it works: "Signing, please wait". */
  busyLabel?: string;
};

/** The label, or the busy words over it: both take part in the width, one is seen. */
function Label({
  glyph,
  busy,
  busyLabel,
  children,
}: Pick<ButtonProps, 'glyph' | 'busy' | 'busyLabel' | 'children'>) {
  return (
    <span className="keep">
      <span data-unseen={busy || undefined} aria-hidden={busy || undefined}>
        {glyph && <Glyph name={glyph} />}
        {children}
      </span>
      {busy && <span>{busyLabel}</span>}
    </span>
  );
}

const doNothing: NonNullable<ButtonProps['onClick']> = (event) => event.preventDefault();

/** A button that says what happens. Shut, it stays in the tab order with its reason beside it. */
export function Button(props: ButtonProps) {
  const {
    kind,
    small,
    glyph,
    shutReason,
    reasonId,
    busy = false,
    busyLabel = 'Please wait',
    children,
    ...rest
  } = props;
  const ownReasonId = useId();
  const describedBy = shutReason ? ownReasonId : (reasonId ?? rest['aria-describedby']);
  // a shut submit button must not send its form either
  const off = { type: 'button', 'aria-disabled': true, onClick: doNothing } as const;
  const button = (
    <button
      type="button"
      {...rest}
      {...(shutReason || reasonId || busy ? off : {})}
      className={`${buttonClass(kind, small)} ${rest.className ?? ''}`.trim()}
      aria-busy={busy || undefined}
      aria-describedby={describedBy}
    >
      <Label glyph={glyph} busy={busy} busyLabel={busyLabel}>
        {children}
      </Label>
    </button>
  );
  if (!shutReason) return button;
  return (
    <span className="shut">
      {button}
      <span className="why-shut" id={ownReasonId}>
        {shutReason}
      </span>
    </span>
  );
}
