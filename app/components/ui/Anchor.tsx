import type { AnchorHTMLAttributes } from "react";
import { Link, useInRouterContext } from "react-router";

export interface AnchorProps extends Omit<AnchorHTMLAttributes<HTMLAnchorElement>, "href"> {
  href: string;
  /** A file or another origin: the browser fetches it, the router stays out. */
  document?: boolean;
}

/** A link within the program where a router is there, a plain one in static pages; works inside an svg too. */
export function Anchor({ href, document = false, ...rest }: AnchorProps) {
  const routed = useInRouterContext();
  return routed && !document && !href.startsWith("#") ? <Link to={href} {...rest} /> : <a href={href} {...rest} />;
}
