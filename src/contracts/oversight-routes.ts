/** Routes of the trail and of who looked. */
export const oversightRoutes = {};
