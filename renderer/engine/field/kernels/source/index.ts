/** The solver's kernels as the engine calls them: one instance of the module serves one network at a time. */
export {
  ascend,
  beginSolve,
  cycleBelow,
  descend,
  driveFloating,
  finish,
  floatingPotentials,
  floatingResidual,
  multiply,
  redCorrection,
  redLength,
  redResidual,
  redSolution,
  residualTimesDirection,
  turn,
} from "./gradients";
export { buildBelow, buildFinest, eastLinks, floatingMatrix, levelsToBuild, northLinks, potentials, prepare } from "./hierarchy";
export { tieBodies, tieConductances, tieNodes } from "./ties";
