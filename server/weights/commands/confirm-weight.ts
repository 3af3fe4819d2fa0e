import type { Actor } from '@shared/accounts/actor';
import { decimalText } from '@shared/canonical';
import { ruleValues } from '@shared/rulebook/read';
import { assessWeight } from '@shared/weights/assess';
import { isMeasured } from '@shared/weights/chart-weight';
import { readWeightForm, type WeightForm, type WeightReading } from '@shared/weights/schema';
import { settleSecondReading } from '@shared/weights/second-reading';
import type { Instant } from '@shared/time';
import { and, eq, isNull } from 'drizzle-orm';
import type { Command } from '../../db/in-hospital';
import { done, refused, type Outcome } from '../../db/outcome';
import { weights } from '../../db/schema/weights';
import type { Tx } from '../../db/transaction';
import { findChild } from '../../children/find-child';
import { childFactsOf, type ChildRow } from '../../children/present';
import { isUsable } from '../../orders/chart-parts';
import { loadZone } from '../../orders/load-context';
import { rulebookInForce } from '../../rulebook/in-force';
import { weightHistory } from '../queries';
import { missesOf, needsOf, recordedEntry, storeWeight, type NewWeight } from './record-weight';

type Confirmed = { usable: boolean; words: string };
type WeightRecord = typeof weights.$inferSelect;
type Second = Extract<WeightReading, { ok: true }>;
type Scene = { tx: Tx; actor: Actor; now: Instant; zone: string; child: ChildRow; first: WeightRecord };

const nothingOwed = () =>
  refused('conflict', { detail: 'Nothing is owed for this weight any more. Look at the chart.' });

/** A second measurement of a weight that was held back: it frees the first, or takes its place. */
export const confirmWeight =
  (actor: Actor, weightId: string, form: WeightForm): Command<Confirmed> =>
  async (tx, now): Promise<Outcome<Confirmed>> => {
    const [known] = await tx
      .select({ childId: weights.childId })
      .from(weights)
      .where(eq(weights.id, weightId));
    if (known === undefined) return refused('not-found', { detail: 'There is no such weight.' });
    const found = await findChild(tx, actor, 'record-weight', known.childId, { lock: true });
    if (!found.ok) return found;
    const [first] = await tx
      .select()
      .from(weights)
      .where(and(eq(weights.id, weightId), isNull(weights.supersededBy)));
    if (first === undefined || isUsable(first)) return nothingOwed();
    const zone = await loadZone(tx, actor.hospitalId);
    const read = readWeightForm(form, childFactsOf(found.child), now, zone);
    const fault = read.ok ? faultOf(read) : { field: read.field, message: read.message };
    if (!read.ok || fault !== null) {
      const errors = fault === null ? [] : [{ pointer: `/${fault.field}`, detail: fault.message }];
      return refused('bad-input', { detail: 'Some entries need another look.', errors });
    }
    return await settle({ tx, actor, now, zone, child: found.child, first }, read);
  };

const faultOf = ({ method }: Second) =>
  isMeasured(method) && method !== 'birth-weight'
    ? null
    : { field: 'method', message: 'A second measurement is taken on scales.' };

async function settle(scene: Scene, second: Second): Promise<Outcome<Confirmed>> {
  const { tx, actor, first, now } = scene;
  const { rulebook } = await rulebookInForce(tx);
  const byAnotherPerson = first.by !== actor.id;
  const verdict = first.needs === 'nothing' ? 'accept' : first.needs;
  const settled = settleSecondReading(
    { verdict, first: first.kg, second: second.kg, byAnotherPerson },
    ruleValues(rulebook, 'check'),
  );
  if (!settled.usable) {
    return settled.code === 'readings-differ'
      ? await takePlace(scene, second, settled.text)
      : refused('second-person-required', { detail: settled.text });
  }
  await tx
    .update(weights)
    .set({
      secondKg: second.kg,
      secondMethod: second.method,
      secondAt: second.at,
      secondBy: actor.id,
      ...(byAnotherPerson && { confirmedBy: actor.id, confirmedAt: now }),
    })
    .where(eq(weights.id, first.id));
  const to = { first: decimalText(first.kg, 3), second: decimalText(second.kg, 3) };
  const subject = { kind: 'weight', id: first.id };
  return done(
    { usable: true, words: settled.text },
    { entries: [{ act: 'weight-confirmed', subject, child: first.childId, to }] },
  );
}

/** The readings differ: the first is set aside, the second is a weight of its own and judged like any other. */
async function takePlace(scene: Scene, second: Second, text: string): Promise<Outcome<Confirmed>> {
  const { tx, actor, now, zone, child, first } = scene;
  const { rulebook } = await rulebookInForce(tx);
  const { kg, method, at } = second;
  const history = await weightHistory(tx, first.childId);
  const opinion = assessWeight(
    { kg, method, at, child: childFactsOf(child), history, zone },
    ruleValues(rulebook, 'weight'),
  );
  const weight: NewWeight = { childId: first.childId, kg, method, at, opinion, needs: needsOf(opinion) };
  const weightId = await storeWeight(tx, actor, weight, now);
  await tx
    .update(weights)
    .set({ supersededBy: weightId, supersededReason: text })
    .where(eq(weights.id, first.id));
  const usable = weight.needs === 'nothing';
  const owes = usable ? '' : ` ${opinion.findings.map((finding) => finding.text).join(' ')}`;
  const aside = { act: 'weight-refused', subject: { kind: 'weight', id: first.id }, reason: text } as const;
  return done(
    { usable, words: `${text}${owes}` },
    {
      entries: [{ ...aside, child: first.childId }, recordedEntry(weightId, weight)],
      nearMisses: missesOf(weight),
    },
  );
}
