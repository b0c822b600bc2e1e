/** The planner's programs, solved by HiGHS compiled to WebAssembly. It holds the thread, so it runs in a worker. */
import type { Program, Solve, SolverAnswer, SolverQuestion } from '@skyberth/planner';
import highsModule from 'highs';

/** The package runs as an ES module but is typed as CommonJS, so its types show the loader one level too deep. */
const loadHighs = highsModule as unknown as typeof highsModule.default;
type Highs = Awaited<ReturnType<typeof loadHighs>>;

const NOTHING: Omit<SolverAnswer, 'status'> = {
  objective: Number.POSITIVE_INFINITY,
  bound: Number.NEGATIVE_INFINITY,
  values: [],
  reducedCosts: [],
  rowDuals: [],
};

export async function highsSolver(): Promise<Solve> {
  const highs = await loadHighs();
  return (question) => solve(highs, question);
}

function solve(highs: Highs, question: SolverQuestion): SolverAnswer {
  const { program, whole, relativeGap, timeLimitS, onGap } = question;
  if (program.costs.length === 0) return empty(program);
  return highs.withModel(modelOf(highs, program, whole), (model): SolverAnswer => {
    model.options.set({ output_flag: false, time_limit: timeLimitS, mip_rel_gap: relativeGap });
    const { mipLogging } = highs.constants.callbackType;
    model.run({
      [mipLogging](event) {
        const gap = event.data.mip_gap;
        if (gap !== undefined && Number.isFinite(gap)) onGap?.(gap);
      },
    });
    const { modelStatus } = highs.constants;
    const status = model.getModelStatus();
    if (status === modelStatus.infeasible || status === modelStatus.unboundedOrInfeasible)
      return { ...NOTHING, status: 'infeasible' };
    const solved = status === modelStatus.optimal;
    const objective = model.getObjectiveValue();
    const bound = whole ? Number(model.info.get('mip_dual_bound')) : solved ? objective : Number.NEGATIVE_INFINITY;
    const hasPoint = Number(model.info.get('primal_solution_status')) === 2;
    if (!hasPoint) return { status: 'stopped', ...NOTHING, bound };
    const { colValue, colDual, rowDual } = model.getSolution();
    const reached: SolverAnswer = {
      status: solved ? 'solved' : 'stopped',
      objective,
      bound,
      values: colValue,
      reducedCosts: colDual,
      rowDuals: rowDual,
    };
    return reached;
  });
}

/** HiGHS takes no program without columns; it can be met where no row asks for anything. */
function empty({ rows }: Program): SolverAnswer {
  const met = rows.every((row) => row.lower <= 0 && row.upper >= 0);
  return met ? { ...NOTHING, status: 'solved', objective: 0, bound: 0 } : { ...NOTHING, status: 'infeasible' };
}

function modelOf(highs: Highs, { costs, lower, upper, integers, rows }: Program, whole: boolean) {
  const entries = rows.reduce((sum, row) => sum + row.columns.length, 0);
  const starts = new Int32Array(rows.length + 1);
  const indices = new Int32Array(entries);
  const values = new Float64Array(entries);
  let filled = 0;
  for (const [place, row] of rows.entries()) {
    for (const [entry, column] of row.columns.entries()) {
      indices[filled] = column;
      values[filled] = row.values[entry] ?? 0;
      filled += 1;
    }
    starts[place + 1] = filled;
  }
  const { continuous, integer } = highs.constants.variableType;
  return {
    numCols: costs.length,
    numRows: rows.length,
    colCost: costs,
    colLower: lower,
    colUpper: upper,
    rowLower: rows.map((row) => row.lower),
    rowUpper: rows.map((row) => row.upper),
    matrix: { format: 'csr' as const, numRows: rows.length, numCols: costs.length, starts, indices, values },
    ...(whole ? { integrality: costs.map((_, place) => (place < integers ? integer : continuous)) } : {}),
  };
}
