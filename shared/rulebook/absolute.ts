/**
 * The last resort: figures no rulebook can lift. The database holds the same ones as constraints; a test reads
 * them back and compares. A kind gets its line here together with the migration that lets it in.
 */
export const ABSOLUTE = {
  /** mL in 24 h by one maintenance order: the ceiling for boys. NICE NG29 1.4. */
  maintenanceMlPer24h: 2500,
  /** mL in one bolus. NICE's adult bolus, common practice for children. */
  bolusMl: 500,
  /** mL per kg in one bolus. NICE NG29 1.3, resuscitation charts. */
  bolusMlPerKg: 20,
  /** kg: beyond it the entry is a slip of the hand. Ours. */
  weightKgMax: 250,
} as const;
