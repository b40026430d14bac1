import { ButtonLink } from '@/components/ui/button';
import { fileWords } from '@/lib/issuing/issue-file';
import { sizeText, type ShownFile } from './issue-data';

interface IssueFilesProps {
  readonly files: readonly ShownFile[];
  /** The one that matters most to who reads the page is filled; off where the issue isn't to be built from. */
  readonly first?: boolean;
}

/** The files of an issue, each with its size, its SHA-256 in full and the button that takes it away. */
export function IssueFiles({ files, first = true }: IssueFilesProps) {
  return (
    <ul className="issue-files">
      {files.map(({ kind, about, size, sha256, href }, index) => (
        <li key={kind}>
          <span>
            <b>{fileWords[kind]}</b>
            <span className="text-ink2">
              {about}, {sizeText(size)}
            </span>
          </span>
          <ButtonLink href={href} download look={first && index === 0 ? 'filled' : 'outline'}>
            Download<span className="sr-only"> {fileWords[kind]}</span>
          </ButtonLink>
          <span className="hash">SHA-256 {sha256}</span>
        </li>
      ))}
    </ul>
  );
}
