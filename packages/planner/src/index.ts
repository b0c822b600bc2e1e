/** From what a fleet needs to the cheapest set of contacts that gives it, computed from arguments alone. */
export { costSum } from './assemble.js';
export { type NeedFault, needFaults } from './check-need.js';
export { type CraftFigures, clash, shortfalls, sumsOf } from './check-plan.js';
export { greedyPlan } from './greedy.js';
export { type InventedMarket, inventedOffers } from './invented-market.js';
export { makePlan, type PlanQuestion, type PlanResult } from './make-plan.js';
export { PlannerError } from './planner-error.js';
export type { PlanProgress } from './search-plan.js';
export * from './types.js';
export { volumeText } from './words.js';
