import type { Metadata } from 'next';
import { headers } from 'next/headers';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { dayTime } from '@/app/_server/dates';
import { keptLetters } from '@/app/_server/kept-letters';
import { requirePagePerson } from '@/app/_server/page-person';
import { Sheet, Zone } from '@/components/ui/sheet';
import { pages } from '@/lib/api/addresses';

export const metadata: Metadata = { title: 'Letter' };

/** A letter kept on this machine: its plain text, whose link can be followed, and what a mail program makes of its HTML. */
export default async function LetterPage({ params }: { readonly params: Promise<{ readonly letter: string }> }) {
  const { letter: asked } = await params;
  const lead = await requirePagePerson('read letters', `/letters/${asked}`);
  const letter = keptLetters(lead)?.find((one) => one.id === asked);
  if (!letter) notFound();
  // The page's policy holds inside the frame too: its style sheet carries the page's nonce.
  const nonce = (await headers()).get('x-nonce') ?? '';
  return (
    <Sheet>
      <Zone
        title={letter.subject}
        level={1}
        note={`to ${letter.to}, ${dayTime(letter.at)}`}
        aside={
          <Link className="link" href={pages.letters}>
            All letters
          </Link>
        }
      >
        <pre className="mono break-words whitespace-pre-wrap">{linked(letter.text)}</pre>
      </Zone>
      <Zone title="As HTML">
        <iframe
          title="The letter as HTML"
          className="h-130 w-full"
          sandbox="allow-top-navigation-by-user-activation"
          srcDoc={letter.html.replace('<style>', `<base target="_top"><style nonce="${nonce}">`)}
        />
      </Zone>
    </Sheet>
  );
}

/** The text with its address as a link. */
function linked(text: string) {
  return text.split(/(https?:\/\/\S+)/).map((piece, index) =>
    index % 2 === 1 ? (
      <a key={index} className="link" href={piece}>
        {piece}
      </a>
    ) : (
      piece
    ),
  );
}
