'use client';

import { PageFailure, type PageFailureProps } from './_components/page-failure';
import { fontVariables } from './fonts';
import './globals.css';

/** The frame itself failed: this page brings its own. */
export default function GlobalError(props: PageFailureProps) {
  return (
    <html lang="en" className={fontVariables}>
      <body>
        <main><PageFailure {...props} /></main>
      </body>
    </html>
  );
}
