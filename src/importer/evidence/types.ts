import type { Vec3 } from '../../domain/vector.ts';

/** What a model says, beside the members' own lines, of which members are fastened to which; read when it is first asked for. */
export interface Evidence {
  readonly related: readonly Related[];
  readonly plates: readonly Plate[];
  /** Plates and fasteners whose bodies could not be read; they are evidence of nothing. */
  readonly unreadPlates: readonly UnreadPlate[];
  /** Of each element that is part of one, at whatever depth: its nearest assembly. Keys are GlobalIds. */
  readonly assemblies: ReadonlyMap<string, Assembly>;
}

export type RelationshipClass =
  | 'IfcRelConnectsElements'
  | 'IfcRelConnectsPathElements'
  | 'IfcRelConnectsWithRealizingElements';

/** Two elements that the model says are connected; neither need be a member. */
export interface Related {
  /** GlobalIds. */
  readonly a: string;
  readonly b: string;
  readonly by: RelationshipClass;
  /** GlobalIds of the elements that make the connection. */
  readonly realising: readonly string[];
}

/** A plate, an accessory or a fastener as an oriented box, in world metres. */
export interface Plate {
  readonly globalId: string;
  readonly name: string | null;
  readonly class: string;
  readonly centre: Vec3;
  /** Unit, at right angles to one another, right-handed. */
  readonly axes: readonly [Vec3, Vec3, Vec3];
  /** Along `axes`; at least a micrometre. */
  readonly halfSizes: readonly [number, number, number];
  /** GlobalId of the nearest IfcElementAssembly it is part of. */
  readonly assembly: string | null;
}

export interface UnreadPlate {
  readonly globalId: string;
  readonly reason: string;
}

export interface Assembly {
  readonly globalId: string;
  readonly name: string | null;
}
