import { isRouteErrorResponse, useRouteError } from "react-router";
import { Fitting } from "#app/components/ui/Fitting";
import { Strip } from "#app/components/ui/Strip";
import { useTrace } from "#app/components/ui/trace";

interface RouteErrorProps {
  /** The way back. */
  back?: { href: string; label: string; note?: string };
}

/** The page in place of one that cannot be shown. It reads no loader data: that may be what is missing. */
export function RouteError({ back = { href: "/hangar", label: "Back to the hangar" } }: RouteErrorProps) {
  const said = sentenceFor(useRouteError());
  const trace = useTrace();
  return (
    <>
      <Strip
        homeHref="/hangar"
        navLabel="Everywhere"
        links={[
          { label: "Hangar", href: "/hangar" },
          { label: "New install", href: "/installs/new" },
          { label: "Account", href: "/account" },
        ]}
      />
      <main id="main" className="overflow-hidden px-4 py-8 tablet:px-6 tablet:py-10">
        <h1 className="text-h1 tablet:text-[4.4rem] leading-none font-[680] tracking-[-0.04em]">{said.title}</h1>
        <BlankedPipe />
        <p className="max-w-[60ch] text-lead">{said.text}</p>
        <p className="mt-5 flex flex-wrap items-center gap-3">
          <Fitting href={back.href} size="act" note={back.note}>
            {back.label}
          </Fitting>
        </p>
        {said.ours && (
          <p className="mt-7 max-w-[70ch] text-note text-ink-2">
            The fault is ours, and it is in the log. If you report it, name this number: <span className="font-fig">{trace}</span>
          </p>
        )}
      </main>
    </>
  );
}

type Said = { title: string; text: string; ours: boolean };

function sentenceFor(error: unknown): Said {
  if (isRouteErrorResponse(error) && error.status < 500) {
    if (error.status === 404) {
      return {
        title: "This pipe ends here",
        text: "There is no gate, run or page at this address, or it belongs to an install that you are not a member of. It may have been hidden by an edit; the record still has it.",
        ours: false,
      };
    }
    const text =
      typeof error.data === "string" && error.data
        ? error.data
        : "The request was refused, and nothing was changed. Go back, reload the page and try again.";
    return { title: "Not this way", text, ours: false };
  }
  if (error instanceof TypeError && typeof navigator !== "undefined" && !navigator.onLine) {
    return {
      title: "No network",
      text: "This page is not kept on this tablet and the network is away. Go back to a page that you have opened before, or wait for the network.",
      ours: false,
    };
  }
  return {
    title: "This pipe has burst",
    text: "The page could not be made. What was saved before is still there. Go back and try again.",
    ours: true,
  };
}

function BlankedPipe() {
  return (
    <svg
      className="my-3 -ml-6 block h-auto max-h-[230px] w-[calc(100%+1.5rem)]"
      preserveAspectRatio="xMinYMid meet"
      viewBox="0 0 900 190"
      aria-hidden="true"
    >
      <rect x="-10" y="75" width="630" height="42" className="fill-bore stroke-pipe" strokeWidth="2" />
      <rect x="-10" y="77" width="310" height="38" className="fill-flow" />
      <path d="M300 82V110" className="stroke-primer-ink" strokeWidth="7" />
      <path d="M620 52V140" className="stroke-pipe" strokeWidth="18" />
      <path d="M634 58h34l16 16v44l-16 16h-34z" className="fill-plate stroke-pipe" strokeWidth="5" />
    </svg>
  );
}
