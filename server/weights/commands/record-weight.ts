import type { Actor } from '@shared/accounts/actor';
import { decimalText } from '@shared/canonical';
import { readDecimal } from '@shared/decimal-input';
import { toDecimals } from '@shared/rounding';
import { ruleValues } from '@shared/rulebook/read';
import { assessWeight, type WeightOpinion } from '@shared/weights/assess';
import { kgText } from '@shared/weights/chart-weight';
import { KG_FIELD } from '@shared/weights/limits';
import { readWeightForm, type WeightForm } from '@shared/weights/schema';
import { settleSecondReading, type ReadingLimits } from '@shared/weights/second-reading';
import { kilograms, type Kilograms } from '@shared/units';
import type { Instant } from '@shared/time';
import type { Command } from '../../db/in-hospital';
import { done, refused, type NearMiss, type Outcome, type Refused } from '../../db/outcome';
import { weights } from '../../db/schema/weights';
import type { Tx } from '../../db/transaction';
import { findChild } from '../../children/find-child';
import { childFactsOf } from '../../children/present';
import { loadZone } from '../../orders/load-context';
import { rulebookInForce } from '../../rulebook/in-force';
import { weightHistory } from '../queries';

export type Needs = 'nothing' | 'second-measurement' | 'second-person';
export type Recorded = { weightId: string; usable: boolean; needs: Needs; words: string };
export type WeightBody = WeightForm & { secondReadingKg: string | null };

/** A weight as it is about to be stored. */
export type NewWeight = {
  childId: string;
  kg: Kilograms;
  method: WeightForm['method'];
  at: Instant;
  opinion: WeightOpinion;
  /** What its assessment asked for before an order may use it. */
  needs: Needs;
  second?: { kg: Kilograms };
};

export const needsOf = (opinion: WeightOpinion): Needs =>
  opinion.verdict === 'accept' ? 'nothing' : opinion.verdict;

const sentences = (opinion: WeightOpinion): string => opinion.findings.map(({ text }) => text).join(' ');

/** Records a weight; one that looks wrong is kept, and no order may use it until what it owes is done. */
export const recordWeight =
  (actor: Actor, childId: string, body: WeightBody): Command<Recorded> =>
  async (tx, now): Promise<Outcome<Recorded>> => {
    const found = await findChild(tx, actor, 'record-weight', childId, { lock: true });
    if (!found.ok) return found;
    const zone = await loadZone(tx, actor.hospitalId);
    const child = childFactsOf(found.child);
    const read = readWeightForm(body, child, now, zone);
    if (!read.ok) return badField(read.field, read.message);
    const { rulebook } = await rulebookInForce(tx);
    const { kg, method, at } = read;
    const history = await weightHistory(tx, childId);
    const opinion = assessWeight({ kg, method, at, child, history, zone }, ruleValues(rulebook, 'weight'));
    const weight: NewWeight = { childId, kg, method, at, opinion, needs: needsOf(opinion) };
    const fault = takeSecondReading(weight, body.secondReadingKg, ruleValues(rulebook, 'check'));
    if (fault !== null) return fault;
    const weightId = await storeWeight(tx, actor, weight, now);
    return done(
      { weightId, usable: owed(weight) === 'nothing', needs: owed(weight), words: wordsFor(weight) },
      { entries: [recordedEntry(weightId, weight)], nearMisses: missesOf(weight) },
    );
  };

/** Adds a second reading the person took at once; the refusal where it cannot be read or is another weight. */
function takeSecondReading(weight: NewWeight, text: string | null, limits: ReadingLimits): Refused | null {
  if (text === null) return null;
  const second = readDecimal(text, KG_FIELD);
  if (!second.ok) return badField('secondReadingKg', second.message);
  const { verdict } = weight.opinion;
  const reading = { verdict, first: weight.kg, second: second.value, byAnotherPerson: false };
  const settled = settleSecondReading(reading, limits);
  if (!settled.usable && settled.code === 'readings-differ') {
    return readingsDiffer(weight, second.value, settled.text);
  }
  if (settled.usable) weight.second = { kg: kilograms(second.value) };
  return null;
}

/** What is still owed: an agreeing second reading pays for a second measurement, not for a second person. */
const owed = ({ needs, second }: NewWeight): Needs => (second === undefined ? needs : 'nothing');

const badField = (field: string, detail: string): Refused =>
  refused('bad-input', {
    detail: 'Some entries need another look.',
    errors: [{ pointer: `/${field}`, detail }],
  });

function readingsDiffer(weight: NewWeight, second: number, text: string): Refused {
  const subject = { kind: 'child', id: weight.childId };
  const to = { kg: decimalText(weight.kg, 3), second: decimalText(second, 3) };
  return refused('weight-refused', {
    detail: `${text} Weigh again, twice.`,
    errors: [{ pointer: '/secondReadingKg', detail: text }],
    entries: [{ act: 'weight-refused', subject, child: weight.childId, to }],
    nearMisses: missesOf(weight),
  });
}

/** Writes the row; a settled second reading of the same person is written beside the first. */
export async function storeWeight(tx: Tx, actor: Actor, weight: NewWeight, now: Instant): Promise<string> {
  const { childId, kg, method, at, opinion, needs, second } = weight;
  const [row] = await tx
    .insert(weights)
    .values({
      childId,
      kg,
      method,
      at,
      by: actor.id,
      recordedAt: now,
      z: opinion.z === undefined ? null : toDecimals(opinion.z, 2),
      finding: opinion.findings[0]?.code,
      needs,
      ...(second && { secondKg: second.kg, secondMethod: method, secondAt: now, secondBy: actor.id }),
    })
    .returning({ id: weights.id });
  return row!.id;
}

export const recordedEntry = (weightId: string, { childId, kg, method, opinion, needs }: NewWeight) => ({
  act: 'weight-recorded' as const,
  subject: { kind: 'weight', id: weightId },
  child: childId,
  to: {
    kg: decimalText(kg, 3),
    method,
    needs,
    findings: opinion.findings.map(({ code }) => code),
  },
});

/** What the plausibility check stopped, once for each child, finding and figure. */
export const missesOf = ({ childId, kg, opinion }: NewWeight): NearMiss[] =>
  opinion.verdict === 'accept'
    ? []
    : opinion.findings
        .filter(({ strength }) => strength !== 'information')
        .map(({ code, text }) => ({
          class: 'weight' as const,
          limitCode: code,
          childId,
          value: kgText(kg),
          detail: text,
          dedupe: `weight/${childId}/${code}/${decimalText(kg, 3)}`,
        }));

function wordsFor({ kg, opinion, needs, second }: NewWeight): string {
  if (second !== undefined) return `${kgText(kg)} recorded, measured twice.`;
  if (needs === 'nothing') return [`${kgText(kg)} recorded.`, sentences(opinion)].join(' ').trim();
  const owes =
    needs === 'second-person'
      ? 'No order can use it until another person has measured again.'
      : 'No order can use it until it has been measured again.';
  return `${sentences(opinion)} ${owes}`;
}
