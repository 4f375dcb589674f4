import { StrictMode, startTransition } from "react";
import { hydrateRoot } from "react-dom/client";
import { HydratedRouter } from "react-router/dom";
import { TraceContext } from "#app/components/ui/trace";

startTransition(() => {
  hydrateRoot(
    document,
    <StrictMode>
      <TraceContext value={document.documentElement.dataset.trace ?? ""}>
        <HydratedRouter />
      </TraceContext>
    </StrictMode>,
  );
});
