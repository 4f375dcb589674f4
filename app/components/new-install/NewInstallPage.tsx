import type { ReactNode } from "react";
import { Strip } from "#app/components/ui/Strip";
import { TitlePipe } from "#app/components/ui/TitlePipe";

interface NewInstallPageProps {
  page: 1 | 2 | 3;
  person: string;
  /** What the page is about: "what hangs on it". */
  about: string;
  /** Share of the three pages that is answered, 0 to 1. */
  fill: number;
  /** Right of the questions on a tablet, under them on a phone. */
  side?: ReactNode;
  foot: ReactNode;
  children: ReactNode;
}

/** What frames the three pages of a new install. */
export function NewInstallPage({ page, person, about, fill, side, foot, children }: NewInstallPageProps) {
  return (
    <div className="page">
      <Strip homeHref="/hangar" navLabel="Everywhere" links={LINKS} person={person} />
      <main id="main" className="flex flex-col">
        <TitlePipe title="New install" state={`page ${page} of 3: ${about}`} fill={fill} />
        {side ? (
          <div className="grid flex-1 grid-cols-[minmax(0,1fr)] wide:grid-cols-[minmax(0,1fr)_390px]">
            <div className="px-4 py-5 tablet:px-6">{children}</div>
            <aside aria-labelledby="makes" className="border-ink bg-plate px-4 py-5 max-wide:border-t-2 tablet:px-6 wide:border-l-2">
              {side}
            </aside>
          </div>
        ) : (
          children
        )}
      </main>
      {foot}
    </div>
  );
}

const LINKS = [
  { label: "Hangar", href: "/hangar" },
  { label: "New install", href: "/installs/new", current: true },
  { label: "Account", href: "/account" },
];
