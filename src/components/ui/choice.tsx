import type { ComponentProps, ReactNode } from 'react';

type ChoiceProps = Omit<ComponentProps<'input'>, 'type'> & {
  kind?: 'radio' | 'checkbox';
  /** The answer that asks for attention. */
  warns?: boolean;
  children: ReactNode;
};

/** One radio or tick box with its word, for yes-or-no rows and statements. */
export function Choice({
  kind = 'checkbox',
  warns = false,
  children,
  className = '',
  ...input
}: ChoiceProps) {
  return (
    <label className={`opt ${warns ? 'yes' : ''} ${className}`.trim()}>
      <input {...input} type={kind} />
      <span>{children}</span>
    </label>
  );
}
