import { useId } from 'react';
import type { GaugeDrawing } from '@shared/gauge/geometry';
import type { GaugeInput } from '@shared/gauge/input';
import { drawGauge } from '@shared/gauge/geometry';
import type { Text } from '@shared/gauge/labels';

export type BrimGaugeProps = GaugeInput & {
  tone?: 'tide' | 'plum';
  /** Over the drawing, where two stand side by side. */
  heading?: string;
};

function Placed({ at, className, end = false }: { at: Text; className: string; end?: boolean }) {
  return (
    <text className={className} x={at.x} y={at.y} textAnchor={end ? 'end' : undefined}>
      {at.text}
    </text>
  );
}

function Contents({ drawing, clipId }: { drawing: GaugeDrawing; clipId: string }) {
  const { vessel } = drawing;
  // one tall rectangle, moved: the level can then travel without the shape changing
  const box = { x: vessel.left, y: 0, width: vessel.right - vessel.left, height: vessel.bottom };
  const level = (y: number) => ({ transform: `translateY(${y}px)` });
  return (
    <>
      <defs>
        <clipPath id={clipId}>
          <path d={drawing.inside} />
        </clipPath>
      </defs>
      <g clipPath={`url(#${clipId})`}>
        {drawing.ghostY !== null && <rect className="ghost" {...box} style={level(drawing.ghostY)} />}
        <rect className="fill" {...box} style={level(drawing.fillY)} />
      </g>
      {drawing.ghostLine && <path className="gl" d={drawing.ghostLine} />}
      {drawing.engraved.map((line) => (
        <path key={line} className="eng" d={line} />
      ))}
      {drawing.dashed.map((line) => (
        <path key={line} className="bandoff" d={line} />
      ))}
    </>
  );
}

function Over({ over, clipId }: { over: NonNullable<GaugeDrawing['over']>; clipId: string }) {
  return (
    <>
      <defs>
        <clipPath id={clipId}>
          <rect {...over.box} />
        </clipPath>
      </defs>
      <g clipPath={`url(#${clipId})`}>
        {over.hatch.map((line) => (
          <path key={line} className="hx" d={line} />
        ))}
      </g>
      <path className="hxo" d={over.outline} />
      {over.words.map((word) => (
        <Placed key={word.text} at={word} className="t13 ovr" end />
      ))}
    </>
  );
}

function Marks({ drawing }: { drawing: GaugeDrawing }) {
  const right = drawing.vessel.right + 1;
  return (
    <>
      {drawing.ticks.map((tick) => (
        <g key={tick.y}>
          <path className="tick" d={`M${right} ${tick.y}h${tick.isMajor ? 9 : 5}`} />
          {tick.text && <Placed at={tick.text} className="t12" />}
        </g>
      ))}
      {drawing.brackets.map((bracket) => (
        <g key={bracket.path}>
          <path className="brk" d={bracket.path} />
          <Placed at={bracket.label} className="t13 b" end />
          <Placed at={bracket.volume} className="t13s" end />
        </g>
      ))}
    </>
  );
}

function Pointer({ drawing }: { drawing: GaugeDrawing }) {
  const { pointer, ghostLabel } = drawing;
  return (
    <>
      {pointer && (
        <>
          <path className="ptr" d={pointer.path} />
          <Placed at={pointer.volume} className="ord" />
          <Placed at={pointer.note} className="t13s" />
        </>
      )}
      {ghostLabel?.lines.map((line) => (
        <Placed key={line.text} at={line} className="t12" />
      ))}
      {ghostLabel?.leader && <path className="brk" d={ghostLabel.leader} />}
    </>
  );
}

/** The drawn vessel: marks belong to the child, the fill to the order, the brim to the rules. */
export function BrimGauge({ tone = 'tide', heading, ...input }: BrimGaugeProps) {
  const clipId = useId();
  const drawing = drawGauge(input);
  const gauge = (
    <svg
      className={tone === 'plum' ? 'ga plum' : 'ga'}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      width={drawing.width}
      height={drawing.height}
      role="img"
      aria-label={heading ? `${heading}. ${drawing.sentence}` : drawing.sentence}
    >
      <Contents drawing={drawing} clipId={`${clipId}in`} />
      {drawing.over && <Over over={drawing.over} clipId={`${clipId}over`} />}
      <path className="wall" d={drawing.wall} />
      <Marks drawing={drawing} />
      <Pointer drawing={drawing} />
      <path className="brim" d={drawing.brim.line} />
      <path className="pen" d={drawing.brim.flag} />
      <Placed at={drawing.brim.title} className="t13 pent" />
      <Placed at={drawing.brim.note} className="t12 pent" />
    </svg>
  );
  if (!heading) return gauge;
  return (
    <figure>
      <figcaption className="figlab">{heading}</figcaption>
      {gauge}
    </figure>
  );
}
