import { reactanceCircle, resistanceCircle, rimOf, shownReactances, shownResistances, type Circle } from './smith-grid';

interface SmithGridProps {
  readonly centre: number;
  /** Pixels for a reflection of one. */
  readonly scale: number;
  readonly clip: string;
}

/** Drawn calmly: the circles are there to read a place by, not to be looked at. */
export function SmithGrid({ centre, scale, clip }: SmithGridProps) {
  const circles = [
    ...shownResistances.map(resistanceCircle),
    ...shownReactances.flatMap((reactance) => [reactanceCircle(reactance), reactanceCircle(-reactance)]),
  ];
  const at = ({ re, im }: { re: number; im: number }) => ({ x: centre + re * scale, y: centre - im * scale });
  return (
    <>
      <clipPath id={clip}>
        <circle cx={centre} cy={centre} r={scale} />
      </clipPath>
      <g clipPath={`url(#${clip})`} fill="none" stroke="var(--rule)">
        {circles.map((circle: Circle) => (
          <circle key={`${circle.re} ${circle.im}`} cx={centre + circle.re * scale} cy={centre - circle.im * scale} r={circle.radius * scale} />
        ))}
        <line x1={centre - scale} x2={centre + scale} y1={centre} y2={centre} />
      </g>
      <circle cx={centre} cy={centre} r={scale} fill="none" stroke="var(--ash)" strokeWidth={1.2} />
      <g fill="var(--ash)" textAnchor="middle">
        {shownResistances.map((resistance) => (
          <text key={resistance} {...at({ re: (resistance - 1) / (resistance + 1), im: 0 })} dx="-8" dy="-3.5">
            {resistance}
          </text>
        ))}
        {shownReactances.flatMap((reactance) =>
          [reactance, -reactance].map((signed) => {
            const { re, im } = rimOf(signed);
            return (
              <text key={signed} {...at({ re: re * 1.075, im: im * 1.075 })} dy="0.32em">
                {signed < 0 ? '\u2212' : ''}
                {reactance}
              </text>
            );
          }),
        )}
      </g>
    </>
  );
}
