'use client';

import { PageFailure, type PageFailureProps } from '../_components/page-failure';

/** Inside the shell, so that whoever is signed in can go elsewhere. */
export default function SignedInPageError(props: PageFailureProps) {
  return <PageFailure {...props} />;
}
