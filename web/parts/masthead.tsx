import { useEffect, useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import { ScanBox } from './scan-box.tsx';

const PAGES: readonly (readonly [string, string])[] = [
  ['/', 'Now in the shop'],
  ['/live', 'All vessels'],
  ['/runs', 'Runs'],
  ['/parts', 'Parts'],
  ['/trace', 'Trace'],
  ['/materials', 'Materials'],
  ['/instruments', 'Instruments'],
  ['/cycles', 'Cycles'],
  ['/resins', 'Resins'],
  ['/recorders', 'Recorders'],
  ['/audit', 'Audit trail'],
  ['/workshop', 'Workshop'],
];

export function Masthead() {
  const { path } = useLocation();
  const [isOpen, setIsOpen] = useState(false);
  useEffect(() => setIsOpen(false), [path]);
  return (
    <header class="masthead">
      <a class="brand" href="/">
        Dwellbook
      </a>
      <button
        type="button"
        class="menu-button quiet"
        aria-expanded={isOpen}
        aria-controls="pages"
        onClick={() => setIsOpen(!isOpen)}
      >
        Pages
      </button>
      <nav id="pages" aria-label="Pages" data-open={isOpen ? 'yes' : 'no'}>
        <ul class="pages">
          {PAGES.map(([href, name]) => (
            <li key={href}>
              <a href={href} {...(isHere(path, href) ? { 'aria-current': path === href ? 'page' : 'true' } : {})}>
                {name}
              </a>
            </li>
          ))}
        </ul>
      </nav>
      <ScanBox />
    </header>
  );
}

function isHere(path: string, href: string): boolean {
  if (href === '/') return path === '/' || path.startsWith('/import');
  if (href === '/instruments' && path === '/ask') return true;
  if (href === '/materials' && /^\/(rolls|kits)\//.test(path)) return true;
  if (href === '/live' && /^\/(vessels\/|warnings)/.test(path)) return true;
  return path === href || path.startsWith(`${href}/`);
}
