/** The one door to HiGHS (the open-source linear and mixed-integer solver, as WebAssembly). Blocks its thread while it solves. */
import highsLoader, { type Highs } from 'highs';
import type { Program } from './program';

export interface RunOptions {
  seconds: number;
  /** Relative gap at which to stop. */
  gap: number;
  /** Leave integrality out. */
  relaxed?: boolean;
  /** Values of every column to start from. */
  start?: Float64Array;
  /** Columns fixed at a value. */
  fixed?: ReadonlyMap<number, number>;
  onProgress?: () => void;
}

export interface RunResult {
  /** `null`: no feasible values were found. */
  values: Float64Array | null;
  objective: number;
  /** Proven bound on the objective. */
  bound: number;
  infeasible: boolean;
  rowActivity: Float64Array;
  /** Only of a relaxed run. */
  rowDual: Float64Array;
  columnDual: Float64Array;
}

let loading: Promise<Highs> | null = null;

/** HiGHS, loaded once a thread. */
export function loadHighs(): Promise<Highs> {
  loading ??= highsLoader();
  return loading;
}

/** Runs one program. */
export function run(highs: Highs, program: Program, options: RunOptions): RunResult {
  const infinite = (value: number): number =>
    value === Number.POSITIVE_INFINITY ? highs.infinity : value === Number.NEGATIVE_INFINITY ? -highs.infinity : value;
  const starts = [0];
  const indices: number[] = [];
  const values: number[] = [];
  for (const row of program.rows) {
    indices.push(...row.columns);
    values.push(...row.coefficients);
    starts.push(indices.length);
  }
  const fixed = options.fixed ?? new Map<number, number>();
  return highs.withModel(
    {
      numCols: program.columns.length,
      numRows: program.rows.length,
      sense: program.maximise ? highs.constants.objectiveSense.maximize : highs.constants.objectiveSense.minimize,
      colCost: program.columns.map((column) => column.cost),
      colLower: program.columns.map((column, index) => fixed.get(index) ?? column.lower),
      colUpper: program.columns.map((column, index) => infinite(fixed.get(index) ?? column.upper)),
      rowLower: program.rows.map((row) => infinite(row.lower)),
      rowUpper: program.rows.map((row) => infinite(row.upper)),
      matrix: {
        format: 'csr',
        numRows: program.rows.length,
        numCols: program.columns.length,
        starts,
        indices,
        values,
      },
      ...(options.relaxed
        ? {}
        : {
            integrality: program.columns.map((column) =>
              column.integer ? highs.constants.variableType.integer : highs.constants.variableType.continuous,
            ),
          }),
    },
    (model): RunResult => {
      model.options.set({
        output_flag: false,
        mip_rel_gap: options.gap,
        mip_abs_gap: 1e-6,
        time_limit: Math.max(options.seconds, 0.2),
      });
      if (options.start) model.setSolution({ colValue: options.start });
      model.run({
        [highs.constants.callbackType.mipInterrupt]: () => {
          options.onProgress?.();
          return undefined;
        },
      });
      const status = model.getModelStatus();
      const infeasible = status === highs.constants.modelStatus.infeasible;
      const found = Number(model.info.get('primal_solution_status')) === 2;
      const solution = found ? model.getSolution() : null;
      const objective = found ? model.getObjectiveValue() : Number.NaN;
      const dualBound = options.relaxed ? objective : Number(model.info.get('mip_dual_bound'));
      return {
        values: solution?.colValue ?? null,
        objective,
        bound: Number.isFinite(dualBound) && Math.abs(dualBound) < 1e29 ? dualBound : Number.POSITIVE_INFINITY,
        infeasible,
        rowActivity: solution?.rowValue ?? new Float64Array(),
        rowDual: solution?.rowDual ?? new Float64Array(),
        columnDual: solution?.colDual ?? new Float64Array(),
      };
    },
  );
}
