'use client';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { Bar } from '@/components/ui/bar';
import { pages } from '@/lib/api/addresses';
import { SignOut } from './sign-out';

interface DeskBarProps {
  readonly office: string;
  readonly person: string;
  readonly role: string;
  readonly home: string;
  readonly words: readonly {
    readonly label: string;
    readonly href: string;
    readonly within: readonly string[];
    readonly count?: number;
  }[];
}

/** The bar over every page, with the word of the part one is in underlined. */
export function DeskBar({ words, ...rest }: DeskBarProps) {
  const path = usePathname();
  return (
    <Bar
      {...rest}
      words={words.map(({ label, href, within, count }) => ({
        label,
        href,
        current: within.some((start) => path.startsWith(start)),
        // a nought is no news
        ...(count ? { count } : {}),
      }))}
      account={
        <>
          <Link className="link" href={pages.me}>
            Your page
          </Link>
          <SignOut />
        </>
      }
    />
  );
}
