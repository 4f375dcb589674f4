import { Form, useNavigation } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";

interface LiveActProps {
  intent: string;
  commandId: string;
  words: string;
  note: string;
  small?: boolean;
  reason?: string;
}

/** One act of the live card, in the record as soon as it is pressed. */
export function LiveAct({ intent, commandId, words, note, small = false, reason }: LiveActProps) {
  const busy = useNavigation().state !== "idle";
  return (
    <Form method="post">
      <HiddenIds commandId={`${commandId}-${intent.replace(" ", "")}`} intent={intent} />
      <Fitting size={small ? "normal" : "act"} variant={small ? "outline" : "filled"} note={note} reason={reason} busy={busy}>
        {words}
      </Fitting>
    </Form>
  );
}
