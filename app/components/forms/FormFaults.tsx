/** What is wrong with a form as a whole, above its fields. */
export function FormFaults({ faults }: { faults: string[] }) {
  if (!faults.length) return null;
  return (
    <div className="notice notice-refused w-full" role="alert">
      <div className="notice-says">
        <p className="notice-title">Not taken</p>
        {faults.map((fault) => (
          <p key={fault}>{fault}</p>
        ))}
      </div>
    </div>
  );
}
