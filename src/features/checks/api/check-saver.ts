import { problemCode, queryClient } from '@/lib/query-client';
import { newKey, ProblemError } from '@/lib/server-answer';
import { CHECK_FORM_FIELDS, type CheckForm } from '@shared/checks/form';
import { checkPageSchema, type CheckPage } from '@shared/routes/checks';

export type CheckDraft = CheckPage['draft'];

export type SaveStatus = {
  /** kept; waiting for a pause; unsent and tried again; moved in another tab; shut: the check takes no more. */
  phase: 'kept' | 'waiting' | 'unsent' | 'moved' | 'shut';
  savedAt: string | null;
  words: string;
  theirs: CheckDraft | null;
};

type Send = (
  body: { rev: number; form: CheckForm },
  key: string,
) => Promise<{ rev: number; savedAt: string }>;
type Options = { pauseMs?: number; retryMs?: number; onSaved?: (draft: CheckDraft) => void };

const textOf = (form: CheckForm): string => JSON.stringify(CHECK_FORM_FIELDS.map((field) => form[field]));

const UNSENT: Readonly<Record<string, string>> = {
  'session-locked': 'The screen is locked. Your figures are on this page and are sent after unlocking.',
  'signed-out': 'You are signed out. Your figures are on this page: sign in again in another tab.',
  'database-unavailable': 'The server could not keep your figures just now; they are sent again.',
  'too-many-requests': 'The server asks for a pause; your figures are sent again.',
  unreachable:
    'The server does not answer. Your figures are on this page and are sent when the line is back.',
};

/** Keeps a checker's unsent figures as typed: one request at a time, each from the revision it was made from. */
export class CheckSaver {
  private status: SaveStatus;
  private rev: number;
  private form: CheckForm;
  private saved: string;
  private sending: { key: string; rev: number; form: CheckForm } | null = null;
  private running: Promise<void> | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private isClosed = false;
  private readonly listeners = new Set<() => void>();
  private readonly options: Required<Options>;

  constructor(
    private readonly send: Send,
    draft: CheckDraft,
    options: Options = {},
  ) {
    this.options = { pauseMs: 600, retryMs: 4_000, onSaved: () => undefined, ...options };
    this.rev = draft.rev;
    this.form = draft.form;
    this.saved = textOf(draft.form);
    this.status = { phase: 'kept', savedAt: draft.savedAt, words: '', theirs: null };
  }

  readonly snapshot = (): SaveStatus => this.status;
  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  get isKept(): boolean {
    return this.sending === null && textOf(this.form) === this.saved;
  }

  change(form: CheckForm): void {
    if (textOf(form) === textOf(this.form)) return;
    this.form = form;
    if (this.isOver) return;
    if (this.status.words === '') this.tell({ phase: this.isKept ? 'kept' : 'waiting' });
    this.after(this.options.pauseMs);
  }

  /** A person chose between two tabs: goes on from the newer revision with the chosen text. */
  settle(theirs: CheckDraft, form: CheckForm): void {
    this.sending = null;
    this.rev = theirs.rev;
    this.saved = textOf(theirs.form);
    this.form = form;
    this.tell({ phase: this.isKept ? 'kept' : 'waiting', savedAt: theirs.savedAt, words: '', theirs: null });
    this.after(0);
  }

  /** Locked in: the figures are no draft any more. */
  close(): void {
    this.isClosed = true;
    clearTimeout(this.timer);
  }

  reopen(): void {
    this.isClosed = false;
  }

  /** Sends what is not kept, without waiting for a pause. */
  async flush(): Promise<void> {
    clearTimeout(this.timer);
    if (this.isKept || this.isOver) return;
    this.running ??= this.put();
    await this.running;
  }

  private get isOver(): boolean {
    return this.status.phase === 'moved' || this.status.phase === 'shut';
  }

  private after(ms: number): void {
    clearTimeout(this.timer);
    if (this.isKept || this.isClosed) return;
    this.timer = setTimeout(() => {
      this.running ??= this.put();
    }, ms);
  }

  private async put(): Promise<void> {
    this.sending ??= { key: newKey(), rev: this.rev, form: this.form };
    const { key, rev, form } = this.sending;
    try {
      const answer = await this.send({ rev, form }, key);
      this.sending = null;
      this.rev = answer.rev;
      this.saved = textOf(form);
      this.tell({ phase: this.isKept ? 'kept' : 'waiting', savedAt: answer.savedAt, words: '' });
      this.options.onSaved({ rev: answer.rev, form, savedAt: answer.savedAt });
      this.after(this.options.pauseMs);
    } catch (error) {
      this.failed(error);
    } finally {
      this.running = null;
    }
  }

  private failed(error: unknown): void {
    const code = problemCode(error) ?? 'unreachable';
    // an answer was given, so nothing is in doubt: the next attempt may carry newer text
    if (code !== 'unreachable' && code !== 'database-unavailable') this.sending = null;
    if (code === 'session-locked') void queryClient.invalidateQueries({ queryKey: ['me'] });
    const theirs = movedDraft(error);
    if (theirs !== null) return this.meet(theirs);
    const words = UNSENT[code];
    if (words === undefined) {
      return this.tell({ phase: 'shut', words: error instanceof Error ? error.message : '' });
    }
    this.tell({ phase: 'unsent', words });
    if (!this.isClosed) this.timer = setTimeout(() => (this.running ??= this.put()), this.options.retryMs);
  }

  /** Another tab was first: the same text goes on from there, another one waits for a choice. */
  private meet(theirs: CheckDraft): void {
    if (textOf(theirs.form) === textOf(this.form)) this.settle(theirs, this.form);
    else this.tell({ phase: 'moved', words: '', theirs });
  }

  private tell(change: Partial<SaveStatus>): void {
    this.status = { ...this.status, ...change };
    this.listeners.forEach((listener) => listener());
  }
}

function movedDraft(error: unknown): CheckDraft | null {
  if (!(error instanceof ProblemError) || error.code !== 'draft-moved') return null;
  const read = checkPageSchema.shape.draft.safeParse(error.problem.data);
  return read.success ? read.data : null;
}
