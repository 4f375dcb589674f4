import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import type { Role } from "#app/lib/gates/snapshot";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { MemberView } from "#app/lib/views/crew";

interface MemberItemProps {
  member: MemberView;
  commandId: string;
  reply: FormReply | undefined;
  may: boolean;
}

const ROLES: Role[] = ["crew", "builder", "inspector", "lead"];

/** A member with the roles held now; a lead gives a further one here, or ends one. */
export function MemberItem({ member, commandId, reply, may }: MemberItemProps) {
  const { back, faults } = fieldsOf(member.anchor, reply);
  const last = member.roles.length === 1;
  const held = member.roles.map((r) => r.role);
  // Nobody makes themselves the inspector.
  const further = ROLES.filter((role) => !held.includes(role) && !(member.me && role === "inspector"));
  return (
    <li
      id={member.anchor}
      className="grid scroll-mt-2 gap-x-6 gap-y-1 border-b border-line px-4 py-3 target:shadow-[inset_6px_0_0_var(--ink)] tablet:grid-cols-[minmax(0,1fr)_minmax(0,1.4fr)] tablet:px-6"
    >
      <div>
        <h3 className="text-lead">
          {member.name}
          {member.me && <span className="font-normal text-ink-2"> (you)</span>}
        </h3>
        {member.place && <p className="text-ink-2">{member.place}</p>}
      </div>
      <div>
        <ul>
          {member.roles.map(({ role, since }) => (
            <li key={role}>
              <b>{role}</b> <span className="text-ink-2">since {since}</span>
            </li>
          ))}
        </ul>
        {may && (
          <details open={back}>
            <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
              Give or end a role<span className="sr-only"> of {member.name}</span>
            </summary>
            <FormFaults faults={faults} />
            {further.length > 0 && (
              <div className="flex flex-wrap gap-3 pb-4">
                {further.map((role) => (
                  <Form key={role} method="post" preventScrollReset>
                    <HiddenIds commandId={`${commandId}-give-${role}`} intent="give-role" also={{ member: member.id, role }} />
                    <Fitting label={`Give ${member.name} the role ${role}`}>Make {role}</Fitting>
                  </Form>
                ))}
              </div>
            )}
            <p className="max-w-[62ch] pb-2 text-ink-2">
              What was done and signed in it stays. {last && `Without a role ${member.me ? "you are" : "they are"} no longer a member. `}
              {member.place && "A run that has no GO yet waits for the place to be filled; GO turns into HOLD."}
            </p>
            <div className="flex flex-wrap gap-3 pb-2">
              {member.roles.map(({ role }) => (
                <Form key={role} method="post" preventScrollReset>
                  <HiddenIds commandId={`${commandId}-${role}`} intent="end-role" also={{ member: member.id, role }} />
                  <Fitting label={`End the role ${role} of ${member.name}`}>End {role}</Fitting>
                </Form>
              ))}
            </div>
          </details>
        )}
      </div>
    </li>
  );
}
