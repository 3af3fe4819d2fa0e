import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { queryClient } from '@/lib/query-client';
import { ProblemError } from '@/lib/server-answer';
import { contextOfPage } from '@shared/checks/context';
import { checkEntries, isAsked } from '@shared/checks/entries';
import { CHECK_FORM_FIELDS, type CheckForm, type CheckFormField } from '@shared/checks/form';
import { hangTogether } from '@shared/checks/own';
import { readCheckForm } from '@shared/checks/read-form';
import type { CheckPage } from '@shared/routes/checks';
import { CheckSaver } from '../api/check-saver';
import { checkKey, noteLeaving, saveFigures, type CheckSource } from '../api/check-source';

export const entryId = (field: CheckFormField): string => `check-${field}`;

/** Puts the cursor into a field; a strip of choices has it on its chosen one, or its first. */
export function focusEntry(field: CheckFormField): void {
  const element = document.getElementById(entryId(field));
  const target =
    element?.getAttribute('role') === 'radiogroup'
      ? (element.querySelector<HTMLElement>('input:checked') ?? element.querySelector<HTMLElement>('input'))
      : element;
  target?.focus();
}

const isField = (text: string): text is CheckFormField => CHECK_FORM_FIELDS.some((field) => field === text);

/** The fields a problem document names: "/form/initials". */
function faultsIn(error: unknown): Partial<Record<CheckFormField, string>> {
  const errors = error instanceof ProblemError ? (error.problem.errors ?? []) : [];
  return Object.fromEntries(
    errors.flatMap(({ pointer, detail }) => {
      const field = pointer.split('/').at(-1) ?? '';
      return isField(field) ? [[field, detail]] : [];
    }),
  );
}

function useSaver(source: CheckSource, page: CheckPage) {
  const [saver] = useState(
    () =>
      new CheckSaver((body, key) => saveFigures(source, body, key), page.draft, {
        onSaved: (draft) =>
          queryClient.setQueryData(
            checkKey(source),
            (now: CheckPage | undefined) => now && { ...now, draft },
          ),
      }),
  );
  useEffect(() => {
    saver.reopen();
    return () => {
      if (!saver.isKept) noteLeaving(source, saver.flush());
      saver.close();
    };
    // one saver for one page: the source does not change under it
  }, [saver]);
  return { saver, status: useSyncExternalStore(saver.subscribe, saver.snapshot) };
}

/** A checker's own figures: typed text, what is wrong with it, whether it hangs together, and its keeping. */
export function useCheckForm(source: CheckSource, page: CheckPage) {
  const [form, setForm] = useState<CheckForm>(page.draft.form);
  const [left, setLeft] = useState<ReadonlySet<CheckFormField>>(new Set());
  const [isTried, setTried] = useState(false);
  const [refused, setRefused] = useState<Partial<Record<CheckFormField, string>>>({});
  const { saver, status } = useSaver(source, page);
  const asked = { kind: page.order.kind, shortForm: page.isShortForm };
  const context = useMemo(() => contextOfPage(page), [page]);
  const reading = readCheckForm(form, asked);
  const faults = new Map(reading.ok ? [] : reading.errors.map(({ field, message }) => [field, message]));
  useEffect(() => saver.change(form), [saver, form]);

  const set = (changes: Partial<CheckForm>) => {
    setForm((before) => ({ ...before, ...changes }));
    setRefused((before) =>
      Object.fromEntries(Object.entries(before).filter(([field]) => !(field in changes))),
    );
  };
  const focusFirst = (fields: readonly string[]) => {
    const first = checkEntries(asked.kind, asked.shortForm).find(
      (entry) => fields.includes(entry.field) && isAsked(entry, form),
    );
    if (first) focusEntry(first.field);
  };
  return {
    form,
    set,
    asked,
    context,
    reading,
    saver,
    status,
    leave: (field: CheckFormField) => setLeft((before) => new Set(before).add(field)),
    errorOf: (field: CheckFormField): string | undefined =>
      refused[field] ??
      (isTried || (left.has(field) && form[field].trim() !== '') ? faults.get(field) : undefined),
    /** Shows every fault and puts the cursor into the first; true when there is none. */
    isComplete: (): boolean => {
      setTried(true);
      // the fields must be marked before one of them takes the focus
      if (!reading.ok) queueMicrotask(() => focusFirst([...faults.keys()]));
      return reading.ok;
    },
    /** Takes what the server says of single fields; false when it says nothing of any. */
    takeRefusal: (error: unknown): boolean => {
      const named = faultsIn(error);
      setRefused(named);
      const fields = Object.keys(named);
      if (fields.length > 0) setTimeout(() => focusFirst(fields));
      return fields.length > 0;
    },
    hangs: reading.ok ? hangTogether(reading.entries, context) : null,
  };
}
export type CheckFormState = ReturnType<typeof useCheckForm>;
