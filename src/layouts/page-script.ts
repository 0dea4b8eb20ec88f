import { leaveNothing, watchSignOut } from '../components/ui/signed-out.ts';

/** What every page does besides its islands: the theme switch, signing out, closing the menu. */

const YEAR = 365 * 24 * 3600;

function switchTheme() {
  const root = document.documentElement;
  const theme = root.dataset.theme === 'dark' ? 'light' : 'dark';
  root.dataset.theme = theme;
  const secure = location.protocol === 'https:' ? '; Secure' : '';
  // biome-ignore lint/suspicious/noDocumentCookie: the server reads it on the next request; Cookie Store is not everywhere
  document.cookie = `zaffre-theme=${theme}; Path=/; Max-Age=${YEAR}; SameSite=Lax${secure}`;
  nameSwitches();
}

/** The switch says what it would do. */
function nameSwitches() {
  const dark = document.documentElement.dataset.theme === 'dark';
  for (const element of document.querySelectorAll('[data-theme-switch]')) {
    element.textContent = dark ? 'Light theme' : 'Dark theme';
  }
}

async function signOut() {
  const { csrfToken } = (await (await fetch('/api/auth/csrf')).json()) as { csrfToken: string };
  await fetch('/api/auth/signout', {
    method: 'POST',
    headers: { 'x-auth-return-redirect': '1' },
    body: new URLSearchParams({ csrfToken, callbackUrl: '/signin' }),
  });
  leaveNothing();
  location.assign('/signin');
}

function closeMenus(except?: Node | null) {
  for (const menu of document.querySelectorAll<HTMLDetailsElement>('details[data-menu][open]')) {
    if (!except || !menu.contains(except)) menu.open = false;
  }
}

document.addEventListener('click', (event) => {
  const target = event.target as Element;
  if (target.closest('[data-theme-switch]')) switchTheme();
  if (target.closest('[data-sign-out]')) {
    signOut().catch(() => location.assign('/signin'));
  }
  closeMenus(target);
});
document.addEventListener('keydown', (event) => {
  if (event.key !== 'Escape') return;
  const open = document.querySelector<HTMLDetailsElement>('details[data-menu][open]');
  closeMenus();
  if (open?.contains(document.activeElement)) open.querySelector('summary')?.focus();
});
nameSwitches();
watchSignOut();
