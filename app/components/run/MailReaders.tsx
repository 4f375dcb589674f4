interface MailReadersProps {
  title: string;
  readers: { id: string; name: string; places: string }[];
  /** What each of them gets: "GO mail with the card". */
  what: string;
}

/** Who gets what, before it goes. */
export function MailReaders({ title, readers, what }: MailReadersProps) {
  return (
    <div>
      <h2 className="text-lead">{title}</h2>
      <table className="mt-2 w-full">
        <thead className="sr-only">
          <tr>
            <th scope="col">Name</th>
            <th scope="col">Place</th>
            <th scope="col">Gets</th>
          </tr>
        </thead>
        <tbody>
          {readers.map((r) => (
            <tr key={r.id} className="border-t border-line align-top">
              <th scope="row" className="py-2 pr-3 text-left">
                {r.name}
              </th>
              <td className="py-2 pr-3">{r.places}</td>
              <td className="py-2 text-ink-2">{what}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
