/**
 * A ramp from dark blue over grey to yellow in OKLab (Ottosson 2020): lightness grows evenly, so equal steps look
 * equal, and blue against yellow is told apart with every common colour vision.
 */
const stops = [
  { lightness: 0.24, a: 0.0, b: -0.09 },
  { lightness: 0.42, a: 0.0, b: -0.06 },
  { lightness: 0.6, a: 0.0, b: 0.0 },
  { lightness: 0.78, a: -0.01, b: 0.08 },
  { lightness: 0.94, a: -0.02, b: 0.15 },
] as const;

function channel(linear: number): number {
  const value = linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;
  return Math.round(255 * Math.max(0, Math.min(1, value)));
}

/** OKLab to sRGB, 0 to 255; the matrices are those of Ottosson 2020. */
function toRgb(lightness: number, a: number, b: number): readonly [number, number, number] {
  const long = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const middle = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const short = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
  return [
    channel(4.0767416621 * long - 3.3077115913 * middle + 0.2309699292 * short),
    channel(-1.2684380046 * long + 2.6097574011 * middle - 0.3413193965 * short),
    channel(-0.0041960863 * long - 0.7034186147 * middle + 1.707614701 * short),
  ];
}

/** Colour at a part between 0 and 1 of the ramp. */
export function rampColour(part: number): readonly [number, number, number] {
  const at = Math.max(0, Math.min(1, part)) * (stops.length - 1);
  const left = stops[Math.floor(at)] ?? stops[0];
  const right = stops[Math.min(stops.length - 1, Math.floor(at) + 1)] ?? left;
  const weight = at - Math.floor(at);
  const between = (from: number, to: number) => from + (to - from) * weight;
  return toRgb(between(left.lightness, right.lightness), between(left.a, right.a), between(left.b, right.b));
}

/** The ramp as CSS and Plotly write it, in `count` steps. */
export function rampSteps(count: number): readonly (readonly [number, string])[] {
  return Array.from({ length: count }, (_, at) => {
    const part = at / (count - 1);
    return [part, `rgb(${rampColour(part).join(',')})`] as const;
  });
}
