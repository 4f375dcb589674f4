/** Pictures of one record, each opening in full. */
export function Photos({ files, of }: { files: string[]; of: string }) {
  if (!files.length) return null;
  return (
    <ul className="flex flex-wrap gap-2">
      {files.map((file, n) => (
        <li key={file}>
          <a href={`/files/${file}`} className="block">
            <img
              src={`/files/${file}?small`}
              alt={files.length > 1 ? `${of}, photo ${n + 1} of ${files.length}` : of}
              width="150"
              height="100"
              loading="lazy"
              className="h-[100px] w-[150px] object-cover"
            />
          </a>
        </li>
      ))}
    </ul>
  );
}
