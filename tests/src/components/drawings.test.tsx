import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { changes, verdicts } from '../../../shared/schemas/words.ts';
import { DigitStrip } from '../../../src/components/digit-strip/digit-strip.tsx';
import {
  labelFeet,
  labelStrokes,
  numberEvaluations,
} from '../../../src/components/digit-strip/large-labels.ts';
import { LargeStrip } from '../../../src/components/digit-strip/large-strip.tsx';
import { StripHeader } from '../../../src/components/digit-strip/strip-header.tsx';
import { layOutStrip, type StripInput } from '../../../src/components/digit-strip/strip-layout.ts';
import { StripPair } from '../../../src/components/digit-strip/strip-pair.tsx';
import { describePair, describeStrip } from '../../../src/components/digit-strip/strip-words.ts';
import { ChangeMark } from '../../../src/components/marks/change-mark.tsx';
import { changeShapes } from '../../../src/components/marks/change-shapes.tsx';
import { changeMeaning } from '../../../src/components/marks/change-words.ts';
import { Gauge } from '../../../src/components/marks/gauge.tsx';
import { layOutGauge } from '../../../src/components/marks/gauge-layout.ts';
import { NotApplicableMark } from '../../../src/components/marks/not-applicable-mark.tsx';
import { Tally } from '../../../src/components/marks/tally.tsx';
import { VerdictWord } from '../../../src/components/marks/verdict-word.tsx';
import {
  newton,
  problems,
  record,
  secant,
  secantForgetful,
} from '../../../src/routes/specimen/small-solvers.ts';

const kept = record(secant, problems.sqrtThree, [1, 2]);
const lost = record(secantForgetful, problems.sqrtThree, [1, 2]);
const cycle = record(newton, problems.twoCycle, [0]);

describe('change marks', () => {
  it('give each of the fourteen changes a shape of its own', () => {
    const shapes = changes.map((change) => renderToStaticMarkup(changeShapes[change]));
    expect(shapes).toHaveLength(14);
    expect(new Set(shapes).size).toBe(14);
  });

  it('give each change a meaning of its own in words', () => {
    expect(new Set(changes.map((change) => changeMeaning[change])).size).toBe(14);
  });

  it('carry their title as name and are silent beside their word', () => {
    const named = renderToStaticMarkup(<ChangeMark change="costlier" title="sqrt-three: costlier" />);
    expect(named).toContain('role="img"');
    expect(named).toContain('aria-label="sqrt-three: costlier"');
    expect(named).toContain('<title>sqrt-three: costlier</title>');
    expect(renderToStaticMarkup(<ChangeMark change="costlier" />)).toContain('aria-hidden="true"');
  });

  it('draw not applicable as a dash that no change uses', () => {
    const dash = renderToStaticMarkup(<NotApplicableMark title="no-root: not applicable" />);
    expect(dash).toContain('aria-label="no-root: not applicable"');
    for (const change of changes) {
      expect(renderToStaticMarkup(changeShapes[change])).not.toContain('M6 8h4');
    }
  });
});

describe('verdict signs', () => {
  it('have three drawings, each beside its word', () => {
    const drawn = verdicts.map((verdict) => renderToStaticMarkup(<VerdictWord verdict={verdict} />));
    expect(new Set(drawn.map((markup) => markup.replace(/data-verdict="[^"]*"|<\/svg>.*$/g, ''))).size).toBe(
      3,
    );
    for (const [index, verdict] of verdicts.entries()) expect(drawn[index]).toContain(`</svg>${verdict}`);
  });
});

describe('gauge', () => {
  it('draws posts and dot to one scale, on which lengths grow with the 0.7th power of the percent', () => {
    const layout = layOutGauge(20, 10, 212);
    const [left, right] = layout.posts ?? [Number.NaN, Number.NaN];
    expect(layout.zero - left).toBeCloseTo(right - layout.zero, 10);
    expect((layout.dot - layout.zero) / (right - layout.zero)).toBeCloseTo(2 ** 0.7, 10);
    expect(layOutGauge(75, 10, 212).dot).toBeCloseTo(206, 10);
    expect(layOutGauge(-25, 10, 212).dot).toBeCloseTo(6, 10);
    expect(layout.isCut).toBeNull();
  });

  it('sets a dot exactly at the allowance on its post', () => {
    const layout = layOutGauge(2, 2, 184);
    expect(layout.dot).toBe(layout.posts?.[1]);
  });

  it('stretches its scale for all rows alike and says where a dot was cut', () => {
    expect(layOutGauge(150, 2, 212, { least: 0, most: 150 }).isCut).toBeNull();
    expect(layOutGauge(900, 2, 212, { least: 0, most: 900 }).isCut).toBe('right');
  });

  it('says its figures, and that there are none', () => {
    expect(renderToStaticMarkup(<Gauge percent={68.75} allowance={2} />)).toContain(
      'aria-label="+68.8\u202f%, allowance +2\u202f%"',
    );
    expect(renderToStaticMarkup(<Gauge percent={null} allowance={2} />)).toContain(
      'aria-label="nothing to compare"',
    );
  });
});

describe('tally', () => {
  it('draws one group for five strokes and lets only the running one beat', () => {
    const drawn = renderToStaticMarkup(
      <Tally strokes={['done', 'done', 'failed', 'done', 'done', 'now', 'waiting']} />,
    );
    expect(drawn.match(/<svg/g)).toHaveLength(2);
    expect(drawn.match(/class="beat"/g)).toHaveLength(1);
    expect(drawn.match(/var\(--worse\)/g)).toHaveLength(1);
  });
});

describe('digit strip in words', () => {
  it('counts evaluations and names the digits of a solve', () => {
    expect(describeStrip(kept)).toBe(`${kept.events.length} evaluations, ${kept.digits?.toFixed(1)} digits`);
  });

  it('names what was asked again', () => {
    const again = lost.events.filter((event) => event.repeatOf !== null).length;
    expect(again).toBeGreaterThan(5);
    expect(describeStrip(lost)).toContain(`, ${again} at an x asked before, `);
  });

  it('names derivatives, outcome and the last digits where nothing was returned', () => {
    expect(describeStrip(cycle)).toBe(
      '200 evaluations, 100 of them of the derivative, 196 at an x asked before, refused, last at 0.0 digits',
    );
  });

  it('speaks for a pair, and says which of the two is not there', () => {
    expect(describePair(kept, null)).toBe(`reference: ${describeStrip(kept)}; candidate: not there`);
  });
});

describe('DigitStrip', () => {
  const draw = (strip: StripInput): string => renderToStaticMarkup(<DigitStrip strip={strip} />);

  it('is an image 196 by 20 with its text alternative', () => {
    expect(draw(kept)).toContain('width="196" height="20"');
    expect(draw(kept)).toContain(`role="img" aria-label="${describeStrip(kept)}"`);
  });

  it('draws feet only for repeated evaluations, in the colour of errors', () => {
    expect(draw(kept).match(/data-part="feet"/g)?.length ?? 0).toBeLessThanOrEqual(1);
    expect(draw(lost)).toMatch(/data-part="feet"[^>]*stroke="var\(--worse\)"/);
  });

  it('ends in a dot, a ring, a square or open', () => {
    expect(draw(kept)).toContain('data-part="end dot"');
    expect(draw({ ...kept, outcome: 'other root' })).toContain('data-part="ring"');
    expect(draw({ ...kept, outcome: 'false claim' })).toContain('data-part="open square"');
    expect(draw(cycle)).toContain('data-part="open end"');
  });

  it('sets the post and dots beyond it only where the case gives less than 15 digits', () => {
    expect(draw({ ...kept, attainable: 5.2 })).toContain('data-part="limit"');
    expect(draw({ ...kept, attainable: 15.2 })).not.toContain('data-part="limit"');
  });

  it('keeps its height at every pitch', () => {
    const narrow = renderToStaticMarkup(<DigitStrip strip={kept} pitch={7} />);
    expect(narrow).toContain('width="148" height="20"');
  });
});

describe('StripPair', () => {
  it('is one image of two strips, the reference first and grey', () => {
    const drawn = renderToStaticMarkup(<StripPair reference={kept} candidate={lost} />);
    expect(drawn.match(/role="img"/g)).toHaveLength(1);
    expect(drawn.indexOf('text-ref')).toBeLessThan(drawn.indexOf('text-ink'));
  });

  it('keeps 20 px empty where one of the two is not there', () => {
    expect(renderToStaticMarkup(<StripPair reference={null} candidate={lost} />)).toContain('height:20px');
  });
});

describe('StripHeader', () => {
  it('carries 0 4 8 12 16 at the x of the strips', () => {
    const drawn = renderToStaticMarkup(<StripHeader />);
    for (const [digits, x] of [
      [0, 22],
      [4, 62],
      [8, 102],
      [12, 142],
      [16, 182],
    ]) {
      expect(drawn).toMatch(new RegExp(`x="${x}"[^>]*>${digits}<`));
    }
  });
});

describe('large strip', () => {
  it('numbers every evaluation from 1 and leaves steps out', () => {
    expect(
      numberEvaluations([
        { kind: 'f', digits: 1, repeatOf: null },
        { kind: 'step', digits: 1, repeatOf: null },
        { kind: 'df', digits: 1, repeatOf: null },
      ]),
    ).toEqual([1, 1, 2]);
  });

  it('prints no two numbers over each other and always the last one', () => {
    const layout = layOutStrip(kept, { x0: 112, pitch: 20, leftStep: 7 });
    const labels = labelStrokes(layout, numberEvaluations(kept.events));
    const at = labels.map((label) => label.x).toSorted((a, b) => a - b);
    for (const [index, x] of at.slice(1).entries()) expect(x - (at[index] ?? 0)).toBeGreaterThanOrEqual(9);
    expect(labels.map((label) => label.text)).toContain(
      String((layout.strokes.at(-1)?.events[0] ?? Number.NaN) + 1),
    );
  });

  it('prints the number beside a foot only where 22 px are free', () => {
    const layout = layOutStrip(lost, { x0: 112, pitch: 60, leftStep: 7 });
    const labels = labelFeet(layout, numberEvaluations(lost.events), 1072);
    const sorted = layout.feet.map((foot) => foot.x).toSorted((a, b) => a - b);
    expect(labels.length).toBeGreaterThan(2);
    for (const label of labels) {
      const next = sorted.find((x) => x > label.x - 3);
      if (next !== undefined) expect(next - (label.x - 4)).toBeGreaterThanOrEqual(22);
    }
  });

  it('names both rows and what the case can give', () => {
    const drawn = renderToStaticMarkup(
      <LargeStrip
        attainable={5.2}
        rows={[
          { label: 'reference', strip: kept, isReference: true },
          { label: 'candidate', strip: lost, isReference: false },
        ]}
      />,
    );
    expect(drawn).toContain(`reference: ${describeStrip(kept)}; candidate: ${describeStrip(lost)}`);
    expect(drawn).toContain('attainable here 5.2');
  });
});
