import { useEffect, useRef } from 'react';
import { TextField } from '@/components/ui/text-field';

type PasswordFieldProps = {
  value: string;
  onType: (value: string) => void;
  error?: string;
  label?: string;
};

/** The password again, which makes the signature. A wrong one takes the focus back; Enter signs nothing. */
export function PasswordField({ value, onType, error, label = 'Your password, again' }: PasswordFieldProps) {
  const input = useRef<HTMLInputElement>(null);
  useEffect(() => {
    if (error) input.current?.focus();
  }, [error]);
  return (
    <TextField
      ref={input}
      label={label}
      type="password"
      autoComplete="current-password"
      width="full"
      value={value}
      onChange={({ target }) => onType(target.value)}
      error={error}
    />
  );
}
