/** Small line drawings of our own, 20 × 20, drawn with the text's colour. They are always beside a word or carry a label. */
const DRAWINGS = {
  "lay-out": "M3 5.5h14v9H3zM6 8v4M14 8v4M9 10a1.6 1.6 0 1 0 2 0",
  bench: "M3 13.5h14M5 13.5V17M15 13.5V17M6 13.5V9l4-5 4 5v4.5M8.5 9.5h3",
  "probe-plan": "M4 16c3-1 4-4 4-6s2-5 8-6M10 13.5a1.7 1.7 0 1 0 .1 0M14.5 8a1.7 1.7 0 1 0 .1 0",
  sheets: "M6 3h6l3 3v11H6zM12 3v3h3M8.5 10h4M8.5 13h4",
  undo: "M8 5 4 9l4 4M4.5 9H12a4 4 0 0 1 0 8H9",
  redo: "M12 5l4 4-4 4M15.5 9H8a4 4 0 0 0 0 8h3",
  open: "M3 6h5l1.5 2H17v8H3zM3 10h14",
  save: "M4 4h10l2 2v10H4zM7 4v4h5V4M7 16v-4h6v4",
  print: "M6 8V3.5h8V8M4 8h12v6h-2M6 14H4V8M6 12h8v4.5H6z",
  home: "M3.5 9.5 10 4l6.5 5.5M5.5 8.5V16h9V8.5M8.5 16v-4h3v4",
  closer: "M9 4a5 5 0 1 0 .1 0M13 13l4 4M9 6.5v5M6.5 9h5",
  further: "M9 4a5 5 0 1 0 .1 0M13 13l4 4M6.5 9h5",
  whole: "M4 8V4h4M12 4h4v4M16 12v4h-4M8 16H4v-4",
  tape: "M3 13 13 3l4 4L7 17zM6 10l2 2M9 7l2 2M12 4l2 2",
  keys: "M3 6h14v8H3zM5.5 8.5h1M8.5 8.5h1M11.5 8.5h1M14 8.5h.5M6.5 11.5h7",
  theme: "M10 3.5a6.5 6.5 0 1 0 .1 0M10 3.5v13",
  close: "M5 5l10 10M15 5 5 15",
  duplicate: "M7 7h9v9H7zM4 13V4h9",
  remove: "M4 6h12M8 6V4h4v2M6 6l1 10h6l1-10",
  new: "M6 3h6l3 3v11H6zM12 3v3h3M10.5 9v5M8 11.5h5",
} as const;

export type IconName = keyof typeof DRAWINGS;

/** @returns a drawing without a name of its own: the button around it says what it does. */
export function Icon({ name }: { readonly name: IconName }) {
  return (
    <svg className="icon" viewBox="0 0 20 20" width="20" height="20" aria-hidden="true">
      <path d={DRAWINGS[name]} />
    </svg>
  );
}
