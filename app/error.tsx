'use client';

import { PageFailure, type PageFailureProps } from './_components/page-failure';

export default function PageError(props: PageFailureProps) {
  return <main><PageFailure {...props} /></main>;
}
