/** Routes of merging records of one complex. */
export const mergeRoutes = {};
