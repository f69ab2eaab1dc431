/** Names of the signs on an orbit's drawing, outside the path. Pure. */
import type { Annotation } from 'plotly.js-dist-min';
import { sightEnd } from './orbitLines.ts';
import type { OrbitMark } from './orbitMarks.ts';
import { type Plan, spotAt } from './orbitPlan.ts';
import { headingAt, type Place } from './orbitShape.ts';
import { spreadLabels } from './spreadLabels.ts';

/** Names are of two lines where there is room. */
const nameGap = { wide: 32, narrow: 19 };
const nameAway = 24;

/** Outside the orbit, each with a leader to its sign; those of a side keep clear of each other. */
export function markNames(plan: Plan): Partial<Annotation>[] {
  const { marks, view, style } = plan;
  const pixels = plan.height / (view.y[1] - view.y[0]);
  const inView = ({ x, y }: Place): boolean => x >= view.x[0] && x <= view.x[1] && y >= view.y[0] && y <= view.y[1];
  const named = marks.map((mark) => nameOf(plan, mark)).filter(({ at }) => inView(at));
  return [true, false].flatMap((isRight) => {
    const side = named.filter(({ away }) => away.x >= 0 === isRight);
    const wanted = side.map(({ at, away }) => (at.y - view.y[0]) * pixels + away.y);
    const places = spreadLabels(wanted, style.narrow ? nameGap.narrow : nameGap.wide, 14, plan.height - 14);
    return side.map(({ mark, at, away }, index) => ({
      x: at.x,
      xref: 'x',
      y: at.y,
      yref: 'y',
      ax: (isRight ? 1 : -1) * Math.max(10, Math.abs(away.x)),
      ay: (at.y - view.y[0]) * pixels - places[index]!,
      text: mark.label,
      showarrow: true,
      arrowhead: 0,
      arrowwidth: 1,
      arrowcolor: mark.kind === 'transit' ? 'rgba(0, 0, 0, 0)' : style.theme.quiet,
      standoff: 7,
      xanchor: isRight ? 'left' : 'right',
      yanchor: 'middle',
      align: isRight ? 'left' : 'right',
      font: { color: style.theme.ink, size: style.narrow ? 11 : 12 },
    }));
  });
}

interface MarkName {
  readonly mark: OrbitMark;
  readonly at: Place;
  /** Pixels from there to the name, to the right and up. */
  readonly away: Place;
}

/** Away from the orbit at right angles; of a transit, at the end of the line of sight. */
function nameOf(plan: Plan, mark: OrbitMark): MarkName {
  if (mark.kind === 'transit') {
    const [x, y] = [Math.cos(mark.trueAnomaly), Math.sin(mark.trueAnomaly)];
    return { mark, at: sightEnd(plan, mark.trueAnomaly), away: { x: 4 * x, y: 4 * y } };
  }
  const heading = headingAt(plan.shape, mark.trueAnomaly);
  return {
    mark,
    at: spotAt(plan, mark.trueAnomaly),
    away: { x: nameAway * heading.y, y: -nameAway * heading.x },
  };
}
