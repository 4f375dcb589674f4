import type { ReactNode } from "react";

/** The title of a page for somebody who is not signed in, on its pipe. */
export function AuthTitle({ children, says }: { children: ReactNode; says?: ReactNode }) {
  return (
    <>
      <h1 className="text-h2 leading-tight font-[680] tracking-[-0.032em]">{children}</h1>
      <div className="-mx-4 my-3 h-6 border-y-2 border-pipe bg-bore tablet:-mx-6 wide:-mx-12" aria-hidden="true">
        <div className="h-full w-4 bg-flow tablet:w-6 wide:w-12" />
      </div>
      {says && <div className="mb-4 flex flex-col gap-2 text-lead">{says}</div>}
    </>
  );
}
