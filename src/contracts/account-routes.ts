/** Routes of one's own account: sessions, password, address, second factor. */
export const accountRoutes = {};
