/** A weight band's full maintenance: `ml` of it lies under the brim, `fullMl` is all of it. */
export type GaugeBand = { label: string; ml: number; fullMl: number };
/** What full maintenance would add and this order does not: "held back 264", "70 mL as drugs". */
export type GaugeGhost = { label: string; ml: number };

export type GaugeInput = {
  orderMl: number;
  brimMl: number;
  /** "in 24 h", "in one bolus" */
  brimNote: string;
  bands: readonly GaugeBand[];
  ghosts: readonly GaugeGhost[];
  heightPx: number;
  widthPx?: number;
  /** 54 to 60 */
  vesselPx?: number;
  /** Under the volume: "this order", "you". */
  orderNote?: string;
};
