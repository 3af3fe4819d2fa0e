import { call } from '@/lib/api';
import { problemCode, queryClient } from '@/lib/query-client';
import { newKey } from '@/lib/server-answer';
import { ORDER_FORM_FIELDS, type OrderForm } from '@shared/orders/form';
import type { Draft } from '@shared/routes/orders';

export type SaveStatus = {
  /** kept; waiting for a pause in typing; saving; unsent and tried again; moved in another place; refused for good. */
  phase: 'kept' | 'waiting' | 'saving' | 'unsent' | 'moved' | 'refused';
  /** When the server last took the text, RFC 3339. */
  savedAt: string;
  /** Why it is not kept; empty while all is well. */
  words: string;
  /** The draft as it stands elsewhere, while it differs from this one. */
  theirs: Draft | null;
};

type Sending = { key: string; rev: number; form: OrderForm };
type Start = { versionId: string; rev: number; savedAt: string; form: OrderForm };
type Options = {
  onSaved?: (answer: { exceptionsVoided: boolean }) => void;
  /** After the last key, ms. */
  pauseMs?: number;
  retryMs?: number;
};

/** Two forms are the same text where this is the same, in whatever order their fields came. */
const textOf = (form: OrderForm): string =>
  JSON.stringify([ORDER_FORM_FIELDS.map((field) => form[field]), Object.entries(form.limitReasons).sort()]);

const UNSENT: Readonly<Record<string, string>> = {
  'session-locked': 'The screen is locked. What you typed is on this page and is sent after unlocking.',
  'signed-out': 'You are signed out. What you typed is on this page: sign in again in another tab.',
  'database-unavailable':
    'The server could not keep it just now. What you typed is on this page; it is sent again.',
  'too-many-requests': 'The server asks for a pause. What you typed is on this page; it is sent again.',
  unreachable:
    'The server does not answer. What you typed is on this page; it is sent when the line is back.',
};

/**
 * Keeps a draft on the server as it is typed: one request at a time, each with the revision it was made from.
 * A request whose answer was lost is repeated as it was, with its key, before anything newer goes out.
 */
export class DraftSaver {
  private status: SaveStatus;
  private revision: number;
  private form: OrderForm;
  private saved: string;
  private sending: Sending | null = null;
  private running: Promise<void> | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private readonly listeners = new Set<() => void>();
  private readonly pauseMs: number;
  private readonly retryMs: number;
  private isClosed = false;
  onSaved: (answer: { exceptionsVoided: boolean }) => void;

  constructor(
    private readonly start: Start,
    { onSaved = () => undefined, pauseMs = 600, retryMs = 4_000 }: Options = {},
  ) {
    this.onSaved = onSaved;
    this.pauseMs = pauseMs;
    this.retryMs = retryMs;
    this.revision = start.rev;
    this.form = start.form;
    this.saved = textOf(start.form);
    this.status = { phase: 'kept', savedAt: start.savedAt, words: '', theirs: null };
  }

  get rev(): number {
    return this.revision;
  }

  get isKept(): boolean {
    return this.sending === null && textOf(this.form) === this.saved;
  }

  readonly snapshot = (): SaveStatus => this.status;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** The text as it now stands in the form. */
  change(form: OrderForm): void {
    if (textOf(form) === textOf(this.form)) return;
    this.form = form;
    if (this.isOver) return;
    if (this.isKept) return this.tell({ phase: 'kept', words: '' });
    if (this.status.words === '') this.tell({ phase: 'waiting' });
    this.after(this.pauseMs);
  }

  /** Sends what is not kept now; true when the server has everything. */
  async flush(): Promise<boolean> {
    clearTimeout(this.timer);
    for (let turn = 0; turn < 4 && !this.isKept && !this.isOver; turn += 1) {
      this.running ??= this.send();
      await this.running;
      if (this.status.words !== '') break;
    }
    return this.isKept;
  }

  /** Another place changed the draft and a person has chosen: goes on from there with the chosen text. */
  settle(theirs: Draft, form: OrderForm): void {
    this.sending = null;
    this.revision = theirs.rev;
    this.saved = textOf(theirs.form);
    this.form = form;
    this.tell({ phase: this.isKept ? 'kept' : 'waiting', savedAt: theirs.savedAt, words: '', theirs: null });
    if (!this.isKept) this.after(0);
  }

  /** The draft as it stands on the server: taken over, or shown beside this text where both have changed. */
  meet(draft: Draft): void {
    const theirs = textOf(draft.form);
    if (theirs === this.saved || theirs === textOf(this.form)) {
      this.sending = null;
      this.revision = draft.rev;
      this.saved = theirs;
      this.tell({ phase: this.isKept ? 'kept' : 'waiting', savedAt: draft.savedAt, words: '', theirs: null });
      if (!this.isKept) this.after(0);
      return;
    }
    this.sending = null;
    this.tell({ phase: 'moved', words: 'This draft was changed in another place.', theirs: draft });
  }

  close(): void {
    this.isClosed = true;
    clearTimeout(this.timer);
  }

  reopen(): void {
    this.isClosed = false;
  }

  /** Nothing more is sent: the draft moved and is being settled, or is a draft no longer. */
  private get isOver(): boolean {
    return this.status.phase === 'moved' || this.status.phase === 'refused';
  }

  private after(ms: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      this.running ??= this.send();
    }, ms);
  }

  private async send(): Promise<void> {
    this.sending ??= { key: newKey(), rev: this.revision, form: this.form };
    const { key, rev, form } = this.sending;
    if (this.status.words === '') this.tell({ phase: 'saving' });
    try {
      const answer = await call('saveDraft', {
        params: { id: this.start.versionId },
        body: { rev, form },
        key,
      });
      this.sending = null;
      this.revision = answer.rev;
      this.saved = textOf(form);
      this.tell({ phase: this.isKept ? 'kept' : 'waiting', savedAt: answer.savedAt, words: '' });
      this.onSaved(answer);
      if (!this.isKept && !this.isClosed) this.after(this.pauseMs);
    } catch (error) {
      await this.failed(error);
    } finally {
      this.running = null;
    }
  }

  private async failed(error: unknown): Promise<void> {
    const code = problemCode(error) ?? 'unreachable';
    if (code === 'draft-moved') {
      try {
        return this.meet(await call('draft', { params: { id: this.start.versionId } }));
      } catch {
        // the other text cannot be read just now: the save is tried again, and moves again
        this.sending = null;
        return this.tryAgain('unreachable');
      }
    }
    if (code in UNSENT) return this.tryAgain(code);
    this.sending = null;
    this.tell({ phase: 'refused', words: error instanceof Error ? error.message : String(error) });
  }

  private tryAgain(code: string): void {
    // an answer was given, so nothing is in doubt: the next attempt may carry newer text
    if (code !== 'unreachable' && code !== 'database-unavailable') this.sending = null;
    // the shell shows the lock over this page, which stays as it is
    if (code === 'session-locked') void queryClient.invalidateQueries({ queryKey: ['me'] });
    this.tell({ phase: 'unsent', words: UNSENT[code] ?? '' });
    if (!this.isClosed) this.after(this.retryMs);
  }

  private tell(change: Partial<SaveStatus>): void {
    this.status = { ...this.status, ...change };
    this.listeners.forEach((listener) => listener());
  }
}
