/** Routes of second factors. */
export const secondFactorRoutes = {};
