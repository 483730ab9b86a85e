import fc from 'fast-check';
import { expect, test } from 'vitest';
import { Fan } from '../../engine/theory/checks/fan';

const dot = (a: readonly number[], b: readonly number[]) =>
  a.reduce((sum, entry, k) => sum + entry * (b[k] as number), 0);
const gcd = (a: number, b: number): number => (b === 0 ? Math.abs(a) : gcd(b, a % b));
const primitive = (v: readonly number[]) => v.map((entry) => entry / v.reduce(gcd, 0) + 0);
const cross = (a: readonly number[], b: readonly number[]) =>
  [0, 1, 2].map((i) => {
    const [j, k] = [(i + 1) % 3, (i + 2) % 3];
    return (a[j] as number) * (b[k] as number) - (a[k] as number) * (b[j] as number);
  });

const vector = (size: number) =>
  fc.array(fc.integer({ min: -3, max: 3 }), { minLength: size, maxLength: size }).filter((v) => v.some((x) => x !== 0));

/** The fan of all eight octants of space (with `signed` only some of them), cut by planes. */
function cutOctants(signed: readonly boolean[], planes: readonly (readonly number[])[]): Fan {
  const fan = new Fan(3, true);
  for (const axis of [0, 1, 2]) {
    for (const sign of signed[axis] ? [1, -1] : [1]) {
      const point = [0, 1, 2].map((k) => (k === axis ? sign : 0));
      fan.add(point, point);
    }
  }
  for (const plane of planes) if (!fan.cut((point) => dot(plane, point))) throw new Error('The fan was not cut.');
  return fan;
}

// The rays of an arrangement of planes are the lines in which two of them meet: enumerated directly. Planes that only
// touch the cones from outside do not count.
test('the rays are all intersections of two planes', () => {
  const signs = fc.array(fc.boolean(), { minLength: 3, maxLength: 3 });
  fc.assert(
    fc.property(fc.array(vector(3), { maxLength: 6 }), signs, (planes, signed) => {
      const axes = [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ];
      const cutting = planes.filter((plane) => {
        const edges = plane.flatMap((entry, k) => (signed[k] ? [entry, -entry] : [entry]));
        return edges.some((value) => value > 0) && edges.some((value) => value < 0);
      });
      const all = [...axes, ...cutting];
      const lines = all.flatMap((a) => all.map((b) => cross(a, b))).filter((line) => line.some((entry) => entry !== 0));
      const inside = lines.filter((line) => line.every((entry, k) => signed[k] || entry >= 0));
      const expected = new Set(inside.map((line) => primitive(line).join()));
      const found = cutOctants(signed, planes).points.map((point) => primitive(point).join());
      expect(new Set(found)).toEqual(expected);
      expect(found).toHaveLength(expected.size);
    }),
    { numRuns: 200 },
  );
});

test('functions that are linear on each cone are cut like planes', () => {
  // |x| - y on the half plane y >= 0 vanishes along (1, 1) and (-1, 1).
  const fan = new Fan(2, true);
  fan.add([1, 0, 1], [1, 0]);
  fan.add([-1, 0, 1], [-1, 0]);
  fan.add([0, 1, -1], [0, 1]);
  expect(fan.cut((point) => point[2] as number)).toBe(true);
  expect(fan.points.map((point) => point.join()).sort()).toEqual(['-1,0,1', '-1,1,0', '0,1,-1', '1,0,1', '1,1,0']);
  fan.keep((point) => (point[2] as number) <= 0);
  expect(fan.points).toHaveLength(3);
});

test('too much work is refused', () => {
  const fan = new Fan(3, true, 10);
  for (const axis of [0, 1, 2]) {
    for (const sign of [1, -1]) {
      const point = [0, 1, 2].map((k) => (k === axis ? sign : 0));
      fan.add(point, point);
    }
  }
  expect(fan.cut(([x = 0, y = 0, z = 0]) => x + 2 * y - z)).toBe(false);
});
