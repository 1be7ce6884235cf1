'use client'

import './globals.css'

/** The frame itself failed: nothing but the sentence and the way back. */
export default function NotebookFailed({ error }: { error: Error & { digest?: string } }) {
  return (
    <html lang="en">
      <body className="font-sans">
        <title>Stillstand could not be opened</title>
        <main className="px-4 py-10 sm:px-10">
          <h1 className="text-26 leading-tight sm:text-44">
            Stillstand <b>could not be opened</b>
          </h1>
          <p className="mt-2 max-w-[64ch] text-17">
            Nothing that was saved is lost. The server answered that it cannot draw this page now
            {error.digest ? `; its number for this is ${error.digest}` : ''}.
          </p>
          <p className="mt-6">
            {/* The whole page anew: the framework’s own links need the frame that failed. */}
            <a href="" data-kind="primary" className="btn">
              Open it again
            </a>
          </p>
        </main>
      </body>
    </html>
  )
}
