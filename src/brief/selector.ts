import type { Vec3 } from '../domain/vector.ts';

/** An end left null is open. */
export type Range = readonly [from: number | null, to: number | null];

/** All keys given must hold. Texts take `*`. */
export interface MemberSelector {
  readonly line: number;
  readonly class?: string;
  readonly predefinedType?: string;
  readonly globalId?: string;
  readonly tag?: string;
  readonly name?: string;
  readonly type?: string;
  readonly assembly?: string;
  readonly storey?: string;
  readonly layer?: string;
  /** Name of a group it is assigned to. */
  readonly group?: string;
  /** By "Set.Property"; numbers in SI. */
  readonly property?: Readonly<Record<string, boolean | number | string | Range>>;
  readonly section?: string;
  readonly material?: string;
  /** World z of the member's middle, m. */
  readonly level?: Range;
  /** Angle to the horizontal, rad. */
  readonly slope?: Range;
  /** m. */
  readonly length?: Range;
  readonly not?: MemberSelector;
}

/** All keys given must hold. */
export interface NodeSelector {
  readonly line: number;
  readonly near?: Vec3;
  /** m; goes with `near`. */
  readonly within?: number;
  readonly lowest?: boolean;
  readonly highest?: boolean;
  /** World z, m. */
  readonly level?: Range;
  readonly top?: boolean;
  /** An end of such a member lies at the node. */
  readonly endOf?: readonly MemberSelector[];
  /** Such a member meets the node, wherever along it. */
  readonly joins?: readonly MemberSelector[];
  readonly not?: NodeSelector;
}
