import { type ReactNode, useEffect, useRef } from "react";
import { Anchor } from "#app/components/ui/Anchor";
import { Mark } from "#app/components/ui/Mark";

export interface StripLink {
  label: string;
  href: string;
  current?: boolean;
  /** Open ones, shown as a figure. */
  count?: number;
  /** Read aloud after the count: "2 open". */
  countLabel?: string;
}

interface StripProps {
  /** Where the mark leads: the board of this install, or the hangar. */
  homeHref: string;
  /** As painted on the side. Without it the product's name stands here. */
  registration?: string;
  /** Name of the aircraft. */
  ship?: string;
  /** Names the navigation: "Install", "Everywhere". */
  navLabel: string;
  links: StripLink[];
  person?: string;
  /** What the person is here: "builder", "lead today". */
  role?: string;
  /** "saved 10:42 CET", "as of 14:10 CET". */
  saved?: ReactNode;
  network?: "online" | "offline";
  /** At the far right: account link, sign-out, theme. */
  children?: ReactNode;
}

/** The top strip: the registration as painted on the side, then words. On a phone the words scroll sideways, and a sign stands for the name. */
export function Strip(props: StripProps) {
  const { homeHref, registration, ship, navLabel, links, person, role, saved, network, children } = props;
  const words = useRef<HTMLElement>(null);
  const here = links.find((link) => link.current)?.href;
  useEffect(() => {
    const strip = words.current;
    const place = here ? strip?.querySelector<HTMLElement>("[aria-current]") : null;
    // At once, without a movement: the page has just come.
    if (!strip || !place) return;
    const [frame, word] = [strip.getBoundingClientRect(), place.getBoundingClientRect()];
    strip.scrollLeft += word.left + word.width / 2 - (frame.left + frame.width / 2);
  }, [here]);
  return (
    <header className="strip">
      <Anchor className="strip-home" href={homeHref}>
        <Mark size={32} title="Bladecount" />
        {registration ? (
          <span className="strip-registration">{registration}</span>
        ) : (
          <span className="strip-wordmark" aria-hidden="true">
            Bladecount
          </span>
        )}{" "}
        {ship && <span className="strip-ship">{ship}</span>}
      </Anchor>
      <nav ref={words} aria-label={navLabel}>
        <ul>
          {links.map((link) => (
            <li key={link.href}>
              <Anchor href={link.href} aria-current={link.current ? "page" : undefined}>
                {link.label}
                {link.count ? (
                  <>
                    {" "}
                    <span className="strip-count">{link.count}</span>
                    {link.countLabel && <span className="sr-only">{link.countLabel}</span>}
                  </>
                ) : null}
              </Anchor>
            </li>
          ))}
        </ul>
      </nav>
      <div className="strip-who">
        {person && (
          <Anchor className="strip-account" href="/account" aria-label={`Account of ${person}`}>
            <AccountSign />
          </Anchor>
        )}
        {(person || saved) && (
          <p>
            {person && (
              <b>
                <Anchor href="/account">{person}</Anchor>
                {role && `, ${role}`}
              </b>
            )}
            {saved && <span>{saved}</span>}
          </p>
        )}
        {network && <NetworkSign state={network} />}
        {children}
      </div>
    </header>
  );
}

/** A head and shoulders, for where there is no room for the name. */
function AccountSign() {
  return (
    <svg viewBox="0 0 24 24" width="26" height="26" fill="none" stroke="currentColor" strokeWidth="2.4" aria-hidden="true">
      <circle cx="12" cy="8" r="4.6" />
      <path d="M2.6 22.4c.6-5.2 4.4-7.6 9.4-7.6s8.8 2.4 9.4 7.6" strokeLinecap="round" />
    </svg>
  );
}

/** Arcs as on every tablet, struck through when there is no network. */
export function NetworkSign({ state, size = 22 }: { state: "online" | "offline"; size?: number }) {
  return (
    <svg
      className="flex-none"
      width={size}
      height={(size * 18) / 22}
      viewBox="0 0 22 18"
      role="img"
      aria-label={state === "online" ? "network is there" : "no network"}
      fill="none"
      stroke="currentColor"
      strokeWidth="2.4"
      strokeLinecap="round"
    >
      <path d="M2 6.5a13 13 0 0 1 18 0M6 11a7 7 0 0 1 10 0" />
      <circle cx="11" cy="15.4" r="1" fill="currentColor" />
      {state === "offline" && <path d="M3 17.4 19 .6" />}
    </svg>
  );
}
