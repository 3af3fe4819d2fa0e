import type { Actor } from '@shared/accounts/actor';
import { decimalText } from '@shared/canonical';
import { readDecimal } from '@shared/decimal-input';
import { civilDate, DAY, localDateTimeToInstant, type Instant } from '@shared/time';
import { millilitres } from '@shared/units';
import type { Command } from '../../db/in-hospital';
import { done, refused } from '../../db/outcome';
import { intakes } from '../../db/schema/children';
import { loadZone } from '../../orders/load-context';
import { findChild } from '../find-child';

type Body = { what: 'bolus'; ml: string; at: string; where: string };

/** Ours: a bolus of more is a slip, and one older than three days concerns no order. */
const ML = { decimals: 1, min: 0.1, max: 5000, unit: 'mL' } as const;
const LONGEST_AGO = 3 * DAY;

/** A bolus given elsewhere, before the child came or outside the program: it counts in every total. */
export const recordIntake =
  (actor: Actor, childId: string, body: Body): Command<{ intakeId: string }> =>
  async (tx, now) => {
    const found = await findChild(tx, actor, 'record-intake', childId, { lock: true });
    if (!found.ok) return found;
    const zone = await loadZone(tx, actor.hospitalId);
    const volume = readDecimal(body.ml, ML);
    const time = readTime(body.at, now, zone, found.child.bornOn);
    const errors = [
      ...(volume.ok ? [] : [{ pointer: '/ml', detail: volume.message }]),
      ...(time.ok ? [] : [{ pointer: '/at', detail: time.message }]),
      ...(body.where === '' ? [{ pointer: '/where', detail: 'Say where it was given.' }] : []),
    ];
    if (!volume.ok || !time.ok || errors.length > 0) {
      return refused('bad-input', { detail: 'Some entries need another look.', errors });
    }
    const [row] = await tx
      .insert(intakes)
      .values({
        childId,
        what: body.what,
        ml: millilitres(volume.value),
        at: time.at,
        place: body.where,
        by: actor.id,
        recordedAt: now,
      })
      .returning({ id: intakes.id });
    const intakeId = row!.id;
    const to = { what: body.what, ml: decimalText(volume.value, 1), at: new Date(time.at).toISOString() };
    return done(
      { intakeId },
      {
        entries: [{ act: 'intake-recorded', subject: { kind: 'intake', id: intakeId }, child: childId, to }],
      },
    );
  };

type ReadTime = { ok: true; at: Instant } | { ok: false; message: string };

function readTime(text: string, now: Instant, zone: string, bornOn: string): ReadTime {
  const moment = localDateTimeToInstant(text, zone);
  if (!moment.ok) return { ok: false, message: moment.message };
  const { instant: at } = moment;
  if (at > now) return { ok: false, message: 'The time lies ahead.' };
  if (civilDate(at, zone) < bornOn) return { ok: false, message: 'The child was not born then.' };
  if (now - at > LONGEST_AGO) return { ok: false, message: 'That is more than three days ago.' };
  return { ok: true, at };
}
