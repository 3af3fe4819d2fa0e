import { useEffect } from 'react';
import { useNavigate } from 'react-router-dom';

const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName));

/** `/` find a child, `g w` ward, `g c` checks. Never while something is typed. */
export function useShortcuts(wardId: string | undefined): void {
  const navigate = useNavigate();
  useEffect(() => {
    let lead = false;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const go = (path: string, event: KeyboardEvent) => {
      event.preventDefault();
      lead = false;
      void navigate(path);
    };
    const onKey = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      if (event.key === '/') return go('/children', event);
      if (lead && event.key === 'w' && wardId) return go(`/wards/${wardId}`, event);
      if (lead && event.key === 'c') return go('/checks', event);
      lead = event.key === 'g';
      clearTimeout(timer);
      timer = setTimeout(() => (lead = false), 1200);
    };
    window.addEventListener('keydown', onKey);
    return () => {
      clearTimeout(timer);
      window.removeEventListener('keydown', onKey);
    };
  }, [navigate, wardId]);
}
