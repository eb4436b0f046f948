import { HOURS_PER_BLOCK, hourColumns } from './hour-columns.ts';

/**
 * The columns that every block of demand hours is judged in, one after another: nothing of them is left in a result. Modules that run
 * through many hours take its columns as constants of their own, so that the compiler knows where they are; what is handed in, it would
 * load at every hour, as it would what a module imports or exports.
 */
export const block = hourColumns(HOURS_PER_BLOCK);
