/**
 * Flat sequences for layers that do not say how much evaporation can do: the ramp stays out of them. Each falls in lightness from
 * class to class by nearly equal steps, so that its order survives colour-vision deficiency and a grey printer, and each has a
 * hue that the ramp does not pass through.
 */

/** Six classes, least first. */
export type Sequence = readonly [string, string, string, string, string, string];

/** Hours that the brief counts as met: moss, as their weave is. */
export const MOSS: Sequence = ['#eaf3d3', '#c6dba1', '#9fbd72', '#75994b', '#50722f', '#2f4a1a'];
/** Hours that are not met: weld to madder. */
export const MADDER: Sequence = ['#fddfc6', '#f2c28e', '#e0985e', '#bf6c3e', '#93432a', '#5f2317'];
/** Hours without a demand: umber, of no other meaning. */
export const UMBER: Sequence = ['#efe9e6', '#d3c8c2', '#b3a49c', '#8f7d74', '#69574f', '#43352f'];
/** Make-up water: plum, since blue is the ramp's. */
export const PLUM: Sequence = ['#f6e6f0', '#e0c0d6', '#c596b8', '#a06c94', '#74456c', '#482546'];
/** Electricity saved: weld gone to bronze. */
export const BRONZE: Sequence = ['#f8efb4', '#e2d176', '#c3ae45', '#998526', '#6d5d15', '#43390b'];

/** Grades A to D: paper and ink, as a grade is no measure of the climate. */
export const GRADES = { A: '#36403f', B: '#77807d', C: '#b3b8b3', D: '#eeeee9' } as const;
