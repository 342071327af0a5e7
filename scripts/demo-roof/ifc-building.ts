import { ORIGIN } from '../../src/domain/vector.ts';
import { DERIVED, type StepRef } from '../../src/step/values.ts';
import { enumeration, integer } from '../../src/step/write.ts';
import { globalId } from './global-ids.ts';
import { GRID_LETTERS, HALL, TRUSSES } from './hall.ts';
import { axisPlacement, localPlacement, polyline, type ShapeContexts } from './ifc-shapes.ts';
import type { StepText } from './step-text.ts';

export interface Storey {
  readonly ref: StepRef;
  readonly placement: StepRef;
  readonly level: number;
}

export interface Building {
  readonly contexts: ShapeContexts;
  readonly ground: Storey;
  readonly roof: Storey;
  readonly grid: StepRef;
}

const GRID_MARGIN = 2500;

/** Project, units, contexts, the spatial tree and the grid. */
export function writeBuilding(step: StepText, phase: string): Building {
  const model = step.add(
    'IfcGeometricRepresentationContext',
    null,
    'Model',
    integer(3),
    1e-5,
    axisPlacement(step, ORIGIN),
    null,
  );
  const contexts: ShapeContexts = {
    body: subContext(step, model, 'Body', 'MODEL_VIEW'),
    axis: subContext(step, model, 'Axis', 'GRAPH_VIEW'),
    footPrint: subContext(step, model, 'FootPrint', 'PLAN_VIEW'),
  };
  const about = 'An invented scenario: no real yard, place or person';
  const project = step.add(
    'IfcProject',
    globalId('project'),
    null,
    HALL.project,
    about,
    null,
    null,
    phase,
    [model],
    units(step),
  );

  const element = enumeration('ELEMENT');
  const sitePlacement = localPlacement(step, null, ORIGIN);
  const site = step.add(
    'IfcSite',
    globalId('site'),
    null,
    HALL.site,
    null,
    null,
    sitePlacement,
    null,
    null,
    element,
    null,
    null,
    null,
    null,
    null,
  );
  const buildingPlacement = localPlacement(step, sitePlacement, ORIGIN);
  const building = step.add(
    'IfcBuilding',
    globalId('building'),
    null,
    HALL.building,
    null,
    null,
    buildingPlacement,
    null,
    null,
    element,
    null,
    null,
    null,
  );
  const ground = storey(step, buildingPlacement, 'Ground', 0);
  const roof = storey(step, buildingPlacement, 'Roof', HALL.bottomLevel);
  aggregate(step, 'project', project, [site]);
  aggregate(step, 'site', site, [building]);
  aggregate(step, 'building', building, [ground.ref, roof.ref]);
  return { contexts, ground, roof, grid: writeGrid(step, contexts, ground) };
}

export function aggregate(step: StepText, name: string, whole: StepRef, parts: readonly StepRef[]): void {
  step.add('IfcRelAggregates', globalId(`parts of ${name}`), null, null, null, whole, parts);
}

function subContext(step: StepText, parent: StepRef, identifier: string, view: string): StepRef {
  const inherited = [DERIVED, DERIVED, DERIVED, DERIVED] as const;
  return step.add(
    'IfcGeometricRepresentationSubContext',
    identifier,
    'Model',
    ...inherited,
    parent,
    null,
    enumeration(view),
    null,
  );
}

function units(step: StepText): StepRef {
  const unit = (kind: string, prefix: string | null, name: string) =>
    step.add('IfcSIUnit', DERIVED, enumeration(kind), prefix && enumeration(prefix), enumeration(name));
  return step.add('IfcUnitAssignment', [
    unit('LENGTHUNIT', 'MILLI', 'METRE'),
    unit('AREAUNIT', null, 'SQUARE_METRE'),
    unit('VOLUMEUNIT', null, 'CUBIC_METRE'),
    unit('PLANEANGLEUNIT', null, 'RADIAN'),
    unit('MASSUNIT', 'KILO', 'GRAM'),
  ]);
}

function storey(step: StepText, parent: StepRef, name: string, level: number): Storey {
  const placement = localPlacement(step, parent, [0, 0, level]);
  const id = globalId(`storey ${name}`);
  const ref = step.add(
    'IfcBuildingStorey',
    id,
    null,
    name,
    null,
    null,
    placement,
    null,
    null,
    enumeration('ELEMENT'),
    level,
  );
  return { ref, placement, level };
}

function writeGrid(step: StepText, contexts: ShapeContexts, ground: Storey): StepRef {
  const [width, length] = [HALL.panels * HALL.panel, (HALL.trusses - 1) * HALL.bay];
  const letters = GRID_LETTERS.map(([letter, i]) => {
    const x = i * HALL.panel;
    return {
      tag: letter,
      line: polyline(step, [
        [x, -GRID_MARGIN],
        [x, length + GRID_MARGIN],
      ]),
    };
  });
  const numbers = TRUSSES.map((truss) => {
    const y = (truss - 1) * HALL.bay;
    return {
      tag: String(truss),
      line: polyline(step, [
        [-GRID_MARGIN, y],
        [width + GRID_MARGIN, y],
      ]),
    };
  });
  const [uAxes, vAxes] = [letters, numbers].map((axes) =>
    axes.map(({ tag, line }) => step.add('IfcGridAxis', tag, line, true)),
  );
  const lines = step.add(
    'IfcGeometricCurveSet',
    [...letters, ...numbers].map(({ line }) => line),
  );
  const plan = step.add('IfcShapeRepresentation', contexts.footPrint, 'FootPrint', 'GeometricCurveSet', [lines]);
  const shape = step.add('IfcProductDefinitionShape', null, null, [plan]);
  const placement = localPlacement(step, ground.placement, ORIGIN);
  return step.add(
    'IfcGrid',
    globalId('grid'),
    null,
    'Main grid',
    null,
    null,
    placement,
    shape,
    uAxes!,
    vAxes!,
    null,
    enumeration('RECTANGULAR'),
  );
}
