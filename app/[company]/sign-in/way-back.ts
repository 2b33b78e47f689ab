import { paths } from '@/lib/paths';

/** Where to go after signing in: a page of this contractor's, whatever was asked for. */
export function wayBack(company: string, asked: string): string {
  const home = paths.home(company);
  const own = new URL(home, 'http://own.invalid');
  if (!URL.canParse(asked, own.href)) return home;
  const target = new URL(asked, own);
  const inside = target.pathname === home || target.pathname.startsWith(`${home}/`);
  const again = target.pathname === paths.signIn(company);
  return target.origin === own.origin && inside && !again ? target.pathname + target.search : home;
}
