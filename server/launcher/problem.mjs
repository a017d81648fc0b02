/** A reason to stop that the reader can act on: printed as it is, without a stack. */
export class LauncherProblem extends Error {}
