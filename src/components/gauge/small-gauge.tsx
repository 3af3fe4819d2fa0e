import { drawSmallGauge } from '@shared/gauge/small';

type SmallGaugeProps = {
  value: number;
  brim: number;
  notches?: readonly number[];
  widthPx?: number;
  /** The same in words: "1056 of 2000 mL". Empty where the text stands beside it. */
  label: string;
  /** Solid: on a pump now. Hollow: not. */
  onPump?: boolean;
  className?: string;
};

/** The vessel on its side, for rows; always with its figures beside or beneath. */
export function SmallGauge({
  value,
  brim,
  notches,
  widthPx = 124,
  label,
  onPump = true,
  className = '',
}: SmallGaugeProps) {
  const drawing = drawSmallGauge({ value, brim, notches, widthPx });
  const named = label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true };
  return (
    <svg
      className={`hg ${onPump ? '' : 'hollow'} ${className}`.trim().replace(/ +/g, ' ')}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      width={drawing.width}
      height={drawing.height}
      {...named}
    >
      {drawing.fill && <path className="fill" d={drawing.fill} />}
      {drawing.engraved.map((mark) => (
        <path key={mark} className="eng" d={mark} />
      ))}
      {drawing.dashed.map((mark) => (
        <path key={mark} className="bandoff" d={mark} />
      ))}
      {drawing.hatch.map((line) => (
        <path key={line} className="hx" d={line} />
      ))}
      <path className="wall" d={drawing.wall} />
      <path className="brim" d={drawing.brim} />
    </svg>
  );
}
