import { along, dot, norm, scale, subtract, UP, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import { drawColumns } from './columns.ts';
import { faceDistance, faceTowards, gussetSetback, type Host, type Part } from './design.ts';
import type { DrawingBoard } from './drawing-board.ts';
import { ACROSS, type FramePlan, isPost, nodeKey, partFor, SPAN, upright, zAxisOf } from './frame-plan.ts';
import type { Run } from './truss-shapes.ts';

const NOWHERE: Vec3 = [0, 0, 0];

/** Draws one truss of the roof and what it stands on. */
export class FrameDrawing {
  readonly #board: DrawingBoard;
  readonly #plan: FramePlan;
  readonly #chance: Chance;

  constructor(board: DrawingBoard, plan: FramePlan, chance: Chance) {
    this.#board = board;
    this.#plan = plan;
    this.#chance = chance;
  }

  draw(): void {
    const { shape, index, y, extra } = this.#plan;
    for (const [name, [x, z]] of shape.nodes) this.#board.joint(nodeKey(index, name), [x, y, z]);
    for (const [runKey, stops] of extra) {
      const run = shape.runs.find((r) => r.key === runKey)!;
      for (const stop of stops) this.#board.joint(nodeKey(index, stop.name), this.#pointOn(run, stop.x));
    }
    for (const run of shape.runs) this.#drawRun(run);
    if (this.#plan.columns) drawColumns(this.#board, this.#plan);
    else for (const name of shape.bearings) this.#board.joint(this.#key(name), this.#at(name), { supported: true });
  }

  #key(name: string): string {
    return nodeKey(this.#plan.index, name);
  }

  #at(name: string): Vec3 {
    return this.#board.at(this.#key(name));
  }

  #pointOn(run: Run, x: number): Vec3 {
    const [a, b] = [this.#at(run.nodes[0]), this.#at(run.nodes.at(-1)!)];
    const t = (x - a[0]) / (b[0] - a[0]);
    return [x, a[1], a[2] + t * (b[2] - a[2])];
  }

  #directionOf(run: Run): Vec3 {
    return unit(subtract(this.#at(run.nodes.at(-1)!), this.#at(run.nodes[0])))!;
  }

  #drawRun(run: Run): void {
    const { design, extra, index } = this.#plan;
    const part = partFor(design, run);
    const direction = this.#directionOf(run);
    const isChord = run.role !== 'web';
    const names = [...run.nodes, ...(extra.get(run.key) ?? []).map((stop) => stop.name)];
    const start = this.#at(run.nodes[0]);
    names.sort((a, b) => norm(subtract(this.#at(a), start)) - norm(subtract(this.#at(b), start)));
    const ends = [run.nodes[0], run.nodes.at(-1)!] as const;
    const cuts = isChord
      ? ends.map((name, end) => this.#chordCut(run, name, end))
      : ends.map((name, end) => this.#webCut(run, name, end === 0 ? direction : scale(direction, -1)));
    const length = norm(subtract(this.#at(ends[1]), start));
    const total = Math.max(0, cuts[0]) + Math.max(0, cuts[1]);
    const shrink = isChord ? 1 : Math.min(1, (0.6 * length) / Math.max(total, 1e-9));
    const joints = names.map((name) => this.#key(name));
    for (const [end, cut] of cuts.entries()) {
      if (!isChord || cut > -0.45) continue;
      const free = `${this.#key(ends[end])}/${run.key}/free`;
      const outward = end === 0 ? scale(direction, -1) : direction;
      this.#board.joint(free, along(this.#at(ends[end]), outward, -cut), { free: true });
      if (end === 0) joints.unshift(free);
      else joints.push(free);
      cuts[end] = 0;
    }
    const offset = part.pairGap === null ? null : scale(ACROSS, part.pairGap / 2 + part.profile.back);
    this.#board.draw({
      key: `T${index}-${run.key}`,
      role: run.role,
      profile: part.profile,
      zAxis: zAxisOf(run, part, direction),
      frame: index,
      joints,
      cuts: [cuts[0] * shrink, cuts[1] * shrink],
      shifts: isChord ? [NOWHERE, NOWHERE] : [this.#webShift(run, ends[0]), this.#webShift(run, ends[1])],
      splices: this.#splices(run, norm(subtract(this.#board.at(joints[0]), start))),
      spliceGap: this.#plan.detail.spliceGap,
      pair: offset,
      opens: scale(ACROSS, isPost(run) ? -1 : 1),
    });
  }

  #splices(run: Run, ahead: number): number[] {
    const { detail, extra } = this.#plan;
    const start = this.#at(run.nodes[0]);
    const distanceTo = (name: string) => norm(subtract(this.#at(name), start));
    const length = distanceTo(run.nodes.at(-1)!);
    return detail.splices
      .filter((splice) => splice.run === run.key)
      .map(({ share, atPanelPoint }) => {
        const stops = [...run.nodes, ...(extra.get(run.key) ?? []).map((s) => s.name)]
          .map(distanceTo)
          .sort((a, b) => a - b);
        const panels = run.nodes.map(distanceTo);
        const wanted = share * length;
        if (atPanelPoint)
          return panels.reduce((best, s) => (Math.abs(s - wanted) < Math.abs(best - wanted) ? s : best));
        const after = stops.findIndex((s) => s > wanted);
        return (stops[after - 1] + stops[after]) / 2;
      })
      .filter((s) => s > 1 && s < length - 1)
      .map((s) => s + ahead);
  }

  /** Where webs meet off the chord's axis they do so together, at the same distance. */
  #webShift(run: Run, name: string): Vec3 {
    const { design, shape } = this.#plan;
    const part = partFor(design, run);
    const aside = scale(ACROSS, part.sideways * (isPost(run) ? -1 : 1));
    const through = shape.runs.filter((r) => r.role !== 'web' && r.nodes.includes(name));
    const isEnd = through.some((r) => r.nodes[0] === name || r.nodes.at(-1) === name);
    if (through.length !== 1 || isEnd) return aside;
    const host = through[0];
    const outward = scale(upright(this.#directionOf(host)), host.role === 'top chord' ? 1 : -1);
    const size = Math.min(0.06, Math.abs(design.eccentricity) * partFor(design, host).profile.depth);
    const [x, y, z] = scale(outward, Math.sign(design.eccentricity) * size);
    return [aside[0] + x, aside[1] + y, aside[2] + z];
  }

  #hostsAt(name: string, except: Run): Host[] {
    const { shape, design } = this.#plan;
    const hosts: Host[] = shape.runs
      .filter(
        (run) =>
          run !== except && run.nodes.includes(name) && (run.role !== 'web' || run.nodes.slice(1, -1).includes(name)),
      )
      .map((run) => {
        const direction = this.#directionOf(run);
        const part = partFor(design, run);
        return { direction, profile: part.profile, zAxis: zAxisOf(run, part, direction) };
      });
    const atColumn =
      shape.bearing === 'beside' &&
      (name === 't0' || name === 'b0' || name === `t${shape.panels}` || name === `b${shape.panels}`);
    if (atColumn && this.#plan.columns) hosts.push({ direction: UP, profile: design.column, zAxis: SPAN });
    return hosts;
  }

  #webCut(run: Run, name: string, u: Vec3): number {
    const { design, shape } = this.#plan;
    const hosts = this.#hostsAt(name, run);
    const face = Math.max(0, ...hosts.map((host) => faceDistance(host, u)));
    if (design.fit === 'to axis') return 0;
    const early = this.#earlierBy(run, name, u, hosts);
    if (design.fit === 'profiled') return face - early + this.#chance.between(0, 0.003);
    const own = partFor(design, run);
    const neighbours = shape.runs
      .filter((r) => r !== run && r.role === 'web' && (r.nodes[0] === name || r.nodes.at(-1) === name))
      .map((r) => ({
        u: scale(this.#directionOf(r), r.nodes[0] === name ? 1 : -1),
        halfWidth: this.#halfInPlane(partFor(design, r)),
      }));
    const halfWidth = this.#halfInPlane(own);
    return gussetSetback({ u, halfWidth, profile: own.profile }, hosts, neighbours, design.clearance) - early;
  }

  /** How much sooner a web that meets its like off the chord's axis comes to the chord's face. */
  #earlierBy(run: Run, name: string, u: Vec3, hosts: readonly Host[]): number {
    const [host] = hosts;
    if (!host) return 0;
    const square = subtract(u, scale(host.direction, dot(u, host.direction)));
    return dot(this.#webShift(run, name), square) / Math.max(dot(square, square), 0.04);
  }

  #halfInPlane(part: Part): number {
    return (part.turned ? part.profile.width : part.profile.depth) / 2;
  }

  #chordCut(run: Run, name: string, end: number): number {
    const { shape, detail, design } = this.#plan;
    const isTop = run.role === 'top chord';
    const direction = this.#directionOf(run);
    const others = shape.runs.filter((r) => r !== run && r.role !== 'web' && r.nodes.includes(name));
    const isBearing = shape.topNodes[0] === name || shape.topNodes.at(-1) === name || shape.bearings.includes(name);
    if (isBearing && shape.bearing === 'heel') {
      if (!isTop) return -detail.bottomOverhang;
      if (detail.overhang > 0.45) return -detail.overhang;
      if (detail.heel === 'both to the work point') return 0;
      const u = end === 0 ? direction : scale(direction, -1);
      return 0.8 * Math.max(...others.map((r) => this.#faceOf(r, u)));
    }
    if (isBearing && shape.bearing === 'beside' && this.#plan.columns)
      return design.column.depth / 2 + detail.columnGap;
    if (isBearing) return isTop && shape.bearing === 'under top' ? -detail.overhang : -detail.bottomOverhang;
    if (others.length === 0) return -detail.bottomOverhang;
    if (detail.ridge === 'butted' && shape.kind !== 'bowstring') {
      const half = faceTowards(design.topChord.profile, this.#zOf(run), upright(direction));
      return run.key === 'TC1' ? -half * 0.9 : half * 1.05;
    }
    return detail.spliceGap / 2;
  }

  #zOf(run: Run): Vec3 {
    return zAxisOf(run, partFor(this.#plan.design, run), this.#directionOf(run));
  }

  #faceOf(run: Run, u: Vec3): number {
    const part = partFor(this.#plan.design, run);
    return faceDistance({ direction: this.#directionOf(run), profile: part.profile, zAxis: this.#zOf(run) }, u);
  }
}
