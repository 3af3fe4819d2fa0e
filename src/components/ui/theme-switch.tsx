import { useState } from 'react';
import { Segmented } from './segmented';

const KEY = 'brimline-theme';
const OPTIONS = [
  { value: 'day', label: 'Day' },
  { value: 'night', label: 'Night' },
  { value: 'auto', label: 'Auto' },
];

function readChoice(): string {
  try {
    return localStorage.getItem(KEY) ?? 'auto';
  } catch {
    return 'auto';
  }
}

function writeChoice(choice: string): void {
  try {
    localStorage.setItem(KEY, choice);
  } catch {
    // storage shut by the browser: the choice then lasts for this page
  }
  // theme.js listens, and is the only writer of data-theme
  window.dispatchEvent(new CustomEvent(KEY, { detail: choice }));
}

/** Day, night, or as the device has it. */
export function ThemeSwitch() {
  const [choice, setChoice] = useState(readChoice);
  const choose = (value: string) => {
    setChoice(value);
    writeChoice(value);
  };
  return (
    <div className="theme-switch">
      <Segmented label="Light of the screen" labelHidden options={OPTIONS} value={choice} onChoose={choose} />
    </div>
  );
}
