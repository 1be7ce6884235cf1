import { LinkButton } from './link-button'

/** What is not there and what is not yours look the same. */
export function NothingHere() {
  return (
    <div className="pt-10">
      <svg viewBox="0 0 120 64" width="120" height="64" aria-hidden>
        <path
          d="M43 16V61H77V16M42 10H78"
          fill="none"
          stroke="var(--ink)"
          strokeWidth="2.25"
          strokeLinecap="round"
          strokeDasharray="0.01 4.5"
        />
        <path d="M53 31L67 45M67 31L53 45" stroke="var(--ink)" strokeWidth="2.5" strokeLinecap="round" />
        <path d="M0 63H120" stroke="var(--ink)" strokeWidth="1.75" />
      </svg>
      <h1 className="mt-4 text-26 leading-tight sm:text-44">
        <b>Nothing</b> stands at this address
      </h1>
      <p className="mt-2 max-w-[64ch] text-17">
        It may have been typed wrong, or what is there is not shared with you. Nothing was changed.
      </p>
      <div className="mt-6">
        <LinkButton href="/" kind="primary">
          To the first page
        </LinkButton>
      </div>
    </div>
  )
}
