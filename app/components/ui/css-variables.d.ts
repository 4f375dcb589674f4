import "react";

/* Custom properties as inline styles: how far a pipe is filled, where a bar ends. */
declare module "react" {
  interface CSSProperties {
    [variable: `--${string}`]: string | number | undefined;
  }
}
