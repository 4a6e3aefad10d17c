import { memo, useEffect, useState } from "react";
import { texts } from "../texts/texts";
import type { PagePicture } from "./sheet-choice";

const words = texts.sheets;

/** A page as a small picture; as a file of its own it costs the window no more than a photograph. */
const SmallPage = memo(function SmallPage({ svg, widthMm, heightMm }: Pick<PagePicture, "svg" | "widthMm" | "heightMm">) {
  const [address, setAddress] = useState<string | null>(null);
  useEffect(() => {
    const made = URL.createObjectURL(new Blob([svg], { type: "image/svg+xml" }));
    setAddress(made);
    return () => URL.revokeObjectURL(made);
  }, [svg]);
  const ratio = { aspectRatio: `${widthMm} / ${heightMm}` };
  return address === null ? <span style={ratio} /> : <img src={address} alt="" style={ratio} loading="lazy" decoding="async" />;
});

export interface PageStripProps {
  readonly pages: readonly PagePicture[];
  /** Index of the first page that is in sight. */
  readonly first: number;
  readonly onGo: (index: number) => void;
}

/** All pages of the pack at a glance, to go to one of them. */
export function PageStrip({ pages, first, onGo }: PageStripProps) {
  return (
    <nav className="page-strip" aria-label={words.strip}>
      <ol>
        {pages.map(({ id, name, svg, widthMm, heightMm }, index) => (
          <li key={id}>
            <button
              type="button"
              aria-label={words.goToPage(index + 1, name)}
              aria-current={index === first ? "page" : undefined}
              title={name}
              onClick={() => onGo(index)}
            >
              <SmallPage svg={svg} widthMm={widthMm} heightMm={heightMm} />
              <span aria-hidden="true">{index + 1}</span>
            </button>
          </li>
        ))}
      </ol>
    </nav>
  );
}
