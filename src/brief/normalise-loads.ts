import type { LoadRule } from './load-rule.ts';
import { toMemberSelectors, toNodeSelectors, withoutUndefined } from './normalise-selectors.ts';
import type { WrittenLoad } from './written-loads.ts';
import type { Path } from './written-source.ts';

type LineAt = (path: Path) => number;

/** A written load as the rules it stands for: snow and the zones of a wind are area loads. */
export function toLoads(written: WrittenLoad, path: Path, lineAt: LineAt): LoadRule[] {
  const line = lineAt(path);
  if ('selfWeight' in written) {
    const { selfWeight } = written;
    return [{ kind: 'selfWeight', line, factor: typeof selfWeight === 'number' ? selfWeight : selfWeight.factor }];
  }
  if ('area' in written) {
    const { area: pressure, over, ...rest } = written;
    return [{ kind: 'area', line, pressure, over: nodesAt(over, path), ...withoutUndefined(rest) }];
  }
  if ('snow' in written) {
    const {
      snow,
      over,
      exposure = 1,
      thermal = 1,
      arrangement = 'undrifted',
      left = null,
      guards = false,
      ...rest
    } = written;
    const pressure = snow * exposure * thermal;
    const surface = { acts: 'down', per: 'plan', called: `snow, ${arrangement}` } as const;
    const shape = { arrangement, left, guards };
    return [
      { kind: 'area', line, pressure, over: nodesAt(over, path), ...surface, snow: shape, ...withoutUndefined(rest) },
    ];
  }
  if ('wind' in written) {
    const { wind, zones, internal = 0 } = written;
    return zones.map(({ over, coefficient }, i): LoadRule => {
      const at = [...path, 'zones', i];
      const pressure = wind * (coefficient - internal);
      const called = `wind zone ${i + 1}`;
      return {
        kind: 'area',
        line: lineAt(at),
        pressure,
        over: nodesAt(over, at),
        acts: 'normal',
        per: 'slope',
        called,
      };
    });
  }
  if ('point' in written)
    return [{ kind: 'point', line, force: written.point, at: toNodeSelectors(written.at, [...path, 'at'], lineAt) }];
  const on = toMemberSelectors(written.on, [...path, 'on'], lineAt);
  if ('line' in written) return [{ kind: 'line', line, force: written.line, on, per: written.per }];
  if ('temperature' in written) return [{ kind: 'temperature', line, change: written.temperature, on }];
  return [{ kind: 'misfit', line, by: written.misfit, on }];

  function nodesAt(over: Parameters<typeof toNodeSelectors>[0], at: Path) {
    return toNodeSelectors(over, [...at, 'over'], lineAt);
  }
}
