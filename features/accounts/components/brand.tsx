import Image from 'next/image';
import Link from 'next/link';

/** The seed with its hilum, and the name: the way home from every page. */
export function Brand() {
  return (
    <Link href="/" className="flex min-h-11 items-center gap-2.5 font-display font-bold text-xl focus-visible:outline-white">
      <Image src="/hilum.svg" alt="" width={28} height={28} unoptimized />
      Hilum
    </Link>
  );
}
