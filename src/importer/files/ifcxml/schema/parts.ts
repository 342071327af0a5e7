import type { SchemaFamily } from '../../../schema.ts';

/**
 * Some entities, of one or several schemas: the facts that ifcXML leaves to its reader, which are each entity's supertype and
 * its attributes in order. Source: the EXPRESS schemas IFC2X3 TC1, IFC4 ADD2 TC1 and IFC4X3 ADD2 (ISO 16739), from which the
 * tables were made. Looks, documents, classifications, costs, time, resources, building services and earthworks are left out.
 *
 * A line is `Supertype: Entity Entity | Attribute=kind Attribute=kind`, `-` for no supertype; it goes on where the next is
 * indented. A kind is `r` real, `i` integer, `s` string, `b` boolean, `l` logical, `e` enumeration, `x` binary, `@` an
 * instance (with its entity, where that can be instantiated), `?` a choice of types; each `*` after it makes a list of it,
 * with its length before where the schema fixes that of the inner list. `-Attribute` is one that the entity derives.
 */
export interface SchemaPart {
  readonly of: readonly SchemaFamily[];
  readonly entities: string;
}
