import type { ReactNode } from "react";
import { Link, useNavigation } from "react-router";
import { PinStub } from "#app/components/gate/PinStub";
import { SignTag } from "#app/components/gate/SignTag";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { useLive } from "#app/components/ui/useLive";
import { aboutPin } from "#app/lib/views/sign";

interface SignPageProps {
  kicker: string;
  title: string;
  /** On the act and under it; where nothing can be signed, `instead` stands in their place. */
  act: string;
  note: string;
  instead: ReactNode;
  /** What the last send came to. */
  refusal: { code: string; message: string; blockers: { title: string }[] } | undefined;
  /** Above a refusal that names nothing itself. */
  refusedTitle: string;
  /** Roles in which this person may sign; a choice only where there are several. */
  roles: { role: string; label: string }[];
  as: string;
  /** Above the roles: why nothing can be signed. */
  before?: ReactNode;
  /** What is signed, with the form whose id is "sign". */
  children: ReactNode;
  back: string;
}

/** A sheet that is signed with the PIN: the refusal, the role, what is signed, and the stub. */
export function SignPage(props: SignPageProps) {
  const { kicker, title, act, note, instead, refusal, refusedTitle, roles, as, before, children, back } = props;
  const busy = useNavigation().state === "submitting";
  const live = useLive();
  const pinErrors = refusal && aboutPin(refusal.code) ? [refusal.message] : undefined;
  const stub = instead ?? <PinStub key={refusal?.message} form="sign" label={act} note={note} errors={pinErrors} busy={busy} live={live} />;
  return (
    <main id="main" className="sign-page">
      <SignTag kicker={kicker} title={title} stub={stub}>
        {before}
        {refusal && !pinErrors && (
          <Notice kind="refused" title={refusal.blockers[0]?.title ?? refusedTitle} role="alert">
            <p>{refusal.message}</p>
          </Notice>
        )}
        {roles.length > 1 && (
          <nav className="sign-roles" aria-label="In which role">
            {roles.map(({ role, label }) => (
              <Link key={role} to={`?as=${role}`} replace aria-current={role === as ? "true" : undefined}>
                {label}
              </Link>
            ))}
          </nav>
        )}
        {children}
        <Fitting href={back} className="sign-back">
          Back, not signed
        </Fitting>
      </SignTag>
    </main>
  );
}
