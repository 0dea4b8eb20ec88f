/** Routes of grants and requests for more. */
export const grantRoutes = {};
