/** Routes of members, accounts and their state. */
export const peopleRoutes = {};
