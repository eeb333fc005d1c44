import { Figure, Figures } from '@/app/_components/figure';
import { figuresOf } from './figures-of';
import type { ResultPart } from './result-view';
import { exactAt, showAt, showPlace } from './show-value';

/** The answer at a glance: at the cursor where there is a sweep. */
export function PartFigures({ part, index }: { readonly part: ResultPart; readonly index: number }) {
  const figures = figuresOf(part);
  if (figures.length === 0) return null;
  const { axis } = part;
  const atAxis = axis && figures.some(({ single }) => !single) ? showPlace(axis, index) : null;
  return (
    <div>
      {atAxis && (
        <p className="mb-2.5 text-[13px] text-ash">
          At{' '}
          <b className="font-mono font-medium text-ink">
            {atAxis.value} {atAxis.unit}
          </b>
        </p>
      )}
      <Figures>
        {figures.map((quantity) => {
          const { value, unit } = showAt(quantity, index);
          return <Figure key={quantity.pointer} label={quantity.title} value={value} unit={unit || undefined} exact={exactAt(quantity, index)} inWords={quantity.kind === 'word'} />;
        })}
      </Figures>
    </div>
  );
}
