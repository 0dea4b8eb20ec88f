export * from './accounts.ts';
export * from './complexes.ts';
export * from './folios.ts';
export * from './oversight.ts';
export * from './sign-in.ts';
export * from './spectra.ts';
export * from './work.ts';
