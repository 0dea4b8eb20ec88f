import {
  type Correlation,
  correlation,
  type Diagram,
  type DiagramRequest,
  diagram,
  type Fit,
  type FitRequest,
  fit,
  flattening,
  type GeometryPath,
  type Levels,
  type LevelsRequest,
  type LigandStrength,
  levels,
  type OrgelDiagram,
  type OrgelRequest,
  orgelDiagram,
  tetragonalPath,
  trigonalTwist,
} from '#src/chem/ligand-field/index.ts';

export type PathName = 'tetragonal' | 'twist' | 'flattening';

const PATHS: Record<PathName, (strength: LigandStrength) => GeometryPath> = {
  tetragonal: tetragonalPath,
  twist: trigonalTwist,
  flattening,
};

export interface PathRequest extends LigandStrength {
  n: number;
  path: PathName;
  B: number;
  C: number;
  view: 'ground' | 'absolute';
}

/** What the worker computes, by name. */
export const tasks = {
  /** A diagram, and the levels at one place of it. */
  drawing: (asked: { diagram: DiagramRequest; levels: LevelsRequest }): { diagram: Diagram; levels: Levels } => ({
    diagram: diagram(asked.diagram),
    levels: levels(asked.levels),
  }),
  levels: (asked: LevelsRequest): Levels => levels(asked),
  fit: (asked: FitRequest): Fit => fit(asked),
  orgel: (asked: OrgelRequest): OrgelDiagram => orgelDiagram(asked),
  path: ({ path, eSigma, ePi, ...rest }: PathRequest): Correlation =>
    correlation({ ...rest, path: PATHS[path]({ eSigma, ePi }) }),
};

export type Tasks = typeof tasks;
export type TaskName = keyof Tasks;
export type Asked<N extends TaskName> = Parameters<Tasks[N]>[0];
export type Answered<N extends TaskName> = ReturnType<Tasks[N]>;
