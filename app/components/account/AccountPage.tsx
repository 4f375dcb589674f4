import type { ReactNode } from "react";
import { Anchor } from "#app/components/ui/Anchor";
import { TitlePipe } from "#app/components/ui/TitlePipe";

interface AccountPageProps {
  title: string;
  state: ReactNode;
  children: ReactNode;
}

/** A page about one thing of one's account, with the way back. */
export function AccountPage({ title, state, children }: AccountPageProps) {
  return (
    <main id="main">
      <TitlePipe title={title} state={state} />
      <div className="flex flex-col gap-6 px-4 py-5 tablet:px-6">
        {children}
        <p>
          <Anchor href="/account" className="inline-block py-3 font-semibold text-fitting-ink">
            Back to the account
          </Anchor>
        </p>
      </div>
    </main>
  );
}
