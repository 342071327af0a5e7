import type { Member } from '../domain/member.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { StepFile } from '../step/step-file.ts';
import { asRef, asString } from '../step/values.ts';
import { ContextBook } from './context.ts';
import { FactsBook } from './facts.ts';
import { noteFileProblems, noteGuessedSchema, noteMissingLengthUnit, noteRepeatedGlobalIds } from './file-remarks.ts';
import { FindingsLog } from './findings-log.ts';
import { gridLines } from './grid-lines.ts';
import { type Grid, readGrids } from './grids.ts';
import { markNamer } from './marks.ts';
import { MaterialBook } from './materials/material-book.ts';
import { MemberStore } from './member-store.ts';
import { NotRead } from './not-read.ts';
import type { ImportOptions } from './options.ts';
import { Placements } from './placements.ts';
import { placeNamers, type Storey } from './places.ts';
import type { Sources } from './read-element.ts';
import { Reading } from './reading.ts';
import { readRelations } from './relations.ts';
import { knownSchema } from './schema.ts';
import { SectionBook } from './sections/section-book.ts';
import { SharedDirections } from './shared-directions.ts';
import { SiblingSections } from './siblings.ts';
import type { ImportedModel, Project } from './types.ts';
import { readUnits } from './units.ts';

/** A file made ready for reading, whichever of its views is read. */
export interface Prepared {
  readonly sources: Sources;
  readonly grids: readonly Grid[];
  readonly log: FindingsLog;
}

/** @throws ModelError where the schema is not one that is read; RequestError where the default material is unknown. */
export function prepare(file: StepFile, options: ImportOptions): Prepared {
  const schema = knownSchema(file.schema);
  const log = new FindingsLog();
  const units = readUnits(file);
  const reading = new Reading(file, schema.family, units, log);
  const grids = readGrids(reading);
  const relations = readRelations(file);
  const sections = new SectionBook(reading);
  const facts = new FactsBook(file, units, relations);
  const sources: Sources = {
    reading,
    placements: new Placements(reading, grids),
    relations,
    contexts: new ContextBook(reading, relations),
    sections,
    siblings: new SiblingSections(reading, relations, sections),
    materials: new MaterialBook(reading, options.defaultMaterial),
    facts,
    members: new MemberStore(file, facts),
    directions: new SharedDirections(),
    options,
  };
  if (schema.guessed) noteGuessedSchema(reading, file.schema);
  noteMissingLengthUnit(reading);
  return { sources, grids, log };
}

/**
 * Gathers the findings.
 * @param elements the instances they were read from and those that could not be read
 * @param globalIds theirs; '' where there is none
 * @param members in the order of geometry
 * @param corner least x and y of the members' ends; null where there are none
 */
export function finish(
  { sources, grids, log }: Prepared,
  source: ImportedModel['source'],
  elements: readonly number[],
  globalIds: readonly string[],
  members: readonly Member[],
  corner: Vec3 | null,
): Omit<ImportedModel, 'given' | 'evidence'> {
  const { reading, placements } = sources;
  noteRepeatedGlobalIds(reading, globalIds);
  const storeys = readStoreys(sources);
  noteFileProblems(reading);
  const { placeOf, placesFrom } = placeNamers({ grids, placements, storeys }, corner);
  return {
    schema: reading.file.schema,
    lengthUnit: reading.units.lengthName,
    source,
    members,
    findings: log.findings(placeOf, markNamer(reading.file, elements, globalIds)),
    placeOf,
    placesFrom,
    gridLines: gridLines(grids, placements),
    project: readProject(reading.file),
    elementCount: globalIds.length,
  };
}

function readProject(file: StepFile): Project | null {
  const id = file.idsOf('IFCPROJECT')[0];
  if (id === undefined) return null;
  const args = file.args(id);
  const globalId = asString(args[0])?.trim() ?? '';
  return globalId === '' ? null : { globalId, name: asString(args[2]) };
}

function readStoreys({ reading, placements }: Sources): Storey[] {
  return reading.file.idsOf('IFCBUILDINGSTOREY').flatMap((id): Storey[] => {
    const args = reading.file.args(id);
    const name = asString(args[2]) ?? asString(args[7]);
    if (name === null) return [];
    try {
      return [{ name, level: placements.worldOf(asRef(args[5])).origin[2] }];
    } catch (problem) {
      if (problem instanceof NotRead) return [];
      throw problem;
    }
  });
}
