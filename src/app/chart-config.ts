import type { Colours } from './theme.ts';

/** Figures in the page's own colours and type: thin axes, no frame, no grid. */
export function chartConfig(colours: Colours): object {
  const text = { labelColor: colours.soft, titleColor: colours.soft, labelFont: colours.font, titleFont: colours.font };
  return {
    background: 'transparent',
    font: colours.font,
    view: { stroke: null },
    axis: {
      ...text,
      domainColor: colours.axis,
      tickColor: colours.axis,
      tickSize: 4,
      grid: false,
      gridColor: colours.rule,
      labelFontSize: 11.5,
      titleFontSize: 12,
      titleFontWeight: 'normal',
      titlePadding: 8,
    },
    legend: { ...text, labelFontSize: 12, titleFontSize: 12, titleFontWeight: 'normal', symbolStrokeWidth: 1.6 },
    header: { ...text, labelFontSize: 12, titleFontSize: 12 },
    title: { color: colours.ink, font: colours.font, fontSize: 13, fontWeight: 600, anchor: 'start' },
    text: { color: colours.ink, font: colours.font, fontSize: 12 },
    mark: { color: colours.ink },
    point: { color: colours.ink, filled: true, size: 30 },
    rule: { color: colours.soft },
    line: { color: colours.ink, strokeWidth: 1.6 },
    bar: { color: colours.soft },
    range: {
      category: [colours.ink, colours.hold, colours.loose, colours.aside, colours.soft],
      diverging: [colours.aside, colours.rule, colours.hold],
      ramp: [colours.band, colours.hold],
      heatmap: [colours.band, colours.hold],
    },
  };
}

const NAMED = /^var\(--([a-z]+)\)$/;

/** A specification in which "var(--hold)" and the like are replaced by the colour of that name. */
export function withColours(spec: unknown, colours: Colours): unknown {
  if (typeof spec === 'string') {
    const name = NAMED.exec(spec)?.[1];
    return name !== undefined && name in colours ? colours[name as keyof Colours] : spec;
  }
  if (Array.isArray(spec)) return spec.map((each) => withColours(each, colours));
  if (spec === null || typeof spec !== 'object') return spec;
  return Object.fromEntries(Object.entries(spec).map(([key, value]) => [key, withColours(value, colours)]));
}
