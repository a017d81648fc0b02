import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder that holds package.json. */
export const projectFolder = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

/** @returns the absolute path of a file of the project */
export const inProject = (...parts) => resolve(projectFolder, ...parts);

/** The data folder: `TAREWELL_DATA`, taken from the project's folder when relative, else `.data`. */
export const dataFolder = inProject(process.env.TAREWELL_DATA || '.data');

/**
 * A path as the person typed it: npm runs scripts in the project's folder and keeps the
 * caller's in INIT_CWD.
 */
export const asTyped = (path) => resolve(process.env.INIT_CWD ?? process.cwd(), path);
