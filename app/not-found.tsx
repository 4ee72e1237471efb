import type { Metadata } from 'next';
import { NothingHere } from './_components/nothing-here';

export const metadata: Metadata = { title: 'Nothing here' };

export default function NotFound() {
  return <main><NothingHere /></main>;
}
