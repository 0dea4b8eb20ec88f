/** A way into the registry, and whether guests have it. */
export interface NavigationItem {
  href: string;
  label: string;
  forGuests: boolean;
  /** For stewards alone. */
  forStewards?: true;
}

const ITEMS: readonly NavigationItem[] = [
  { href: '/', label: 'Day sheet', forGuests: false },
  { href: '/complexes', label: 'Complexes', forGuests: true },
  { href: '/spectra', label: 'Spectra', forGuests: false },
  { href: '/ligands', label: 'Ligands', forGuests: false },
  { href: '/symmetry', label: 'Symmetry', forGuests: true },
  { href: '/levels', label: 'Levels', forGuests: true },
  { href: '/folios', label: 'Folios', forGuests: true },
  { href: '/labs', label: 'Labs', forGuests: false },
  { href: '/people', label: 'People', forGuests: false, forStewards: true },
  { href: '/trail', label: 'Trail', forGuests: false, forStewards: true },
];

/** What stands in the head of the page for somebody; nothing for nobody. */
export function navigationFor(role: string | undefined): readonly NavigationItem[] {
  if (role === undefined) return [];
  const open = role === 'steward' ? ITEMS : ITEMS.filter(({ forStewards }) => !forStewards);
  return role === 'guest' ? open.filter(({ forGuests }) => forGuests) : open;
}

/** Whether a page lies under an item: the day sheet only itself, the others with all below them. */
export function isUnder(pathname: string, href: string): boolean {
  return href === '/' ? pathname === '/' : pathname === href || pathname.startsWith(`${href}/`);
}
