/** Small line drawings of our own, 20 × 20, drawn with the text's colour. They are always beside a word or carry a label. */
const DRAWINGS = {
  "lay-out": "M2.5 5h15v10h-15zM5.8 7.5v5M14.2 7.5v5M10 8.2a1.8 1.8 0 1 0 .01 0",
  bench: "M2.5 16.5h15M4.5 16.5V7h11v9.5M7 12.5a3 3 0 0 1 6 0M10 12.5l1.6-2.2",
  "probe-plan": "M4 16.5c2.5-1 3.5-3.5 3.5-6s1.5-5 8.5-6M9.2 10.3a1.7 1.7 0 1 0 .01 0M13.8 13.2a1.7 1.7 0 1 0 .01 0",
  sheets: "M5.5 3h6.5l3 3v11h-9.5zM12 3v3h3M8 10h4.5M8 13h4.5",
  readings: "M3.5 4.5h8v11h-8zM5.5 7.5h4M5.5 10h4M11.5 12.5l2 2 4-5",
  undo: "M8 5 4 9l4 4M4.5 9H12a4 4 0 0 1 0 8H9",
  redo: "M12 5l4 4-4 4M15.5 9H8a4 4 0 0 0 0 8h3",
  open: "M3 16V5h5l1.5 2H15v2.5M3 16l2.5-6.5H18L15.5 16z",
  save: "M4 4h10l2 2v10H4zM7 4v4h5V4M7 16v-4h6v4",
  print: "M6 7.5v-4h8v4M6 14H3.5V7.5h13V14H14M6 11.5h8v5H6z",
  home: "M3.5 9.5 10 4l6.5 5.5M5.5 8.5V16h9V8.5M8.5 16v-4h3v4",
  new: "M5.5 3h6.5l3 3v11h-9.5zM12 3v3h3M10.2 9.5v5M7.7 12h5",
  lock: "M5 9.5h10v7H5zM7 9.5V7a3 3 0 0 1 6 0v2.5M10 12v2",
  unlock: "M5 9.5h10v7H5zM7 9.5V6a3 3 0 0 1 5.8-1M10 12v2",
  group: "M3 3h3M14 3h3v3M17 14v3h-3M6 17H3v-3M3 6V3M6 6h4v4H6zM10 10h4v4h-4",
  closer: "M8.5 3.5a5 5 0 1 0 .01 0M12.3 12.3 17 17M8.5 6v5M6 8.5h5",
  further: "M8.5 3.5a5 5 0 1 0 .01 0M12.3 12.3 17 17M6 8.5h5",
  whole: "M3.5 7.5v-4h4M12.5 3.5h4v4M16.5 12.5v4h-4M7.5 16.5h-4v-4",
  "closer-look": "M8.5 3.5a5 5 0 1 0 .01 0M12.3 12.3 17 17M6 8.5c1-2 1.6-2 2.5 0s1.5 2 2.5 0",
  tape: "M3 13 13 3l4 4L7 17zM6 10l2 2M9 7l2 2M12 4l2 2",
  keys: "M2.5 5.5h15v9h-15zM5.2 8.2h.6M8.2 8.2h.6M11.2 8.2h.6M14.2 8.2h.6M6.5 11.6h7",
  theme: "M10 3.5a6.5 6.5 0 1 0 .01 0M10 3.5v13M10 7h4.6M10 10h6.3M10 13h4.6",
  settings: "M3 6h6.2M12.8 6H17M3 14h2.2M8.8 14H17M11 4.2a1.8 1.8 0 1 0 .01 0M7 12.2a1.8 1.8 0 1 0 .01 0",
  close: "M5.5 5.5l9 9M14.5 5.5l-9 9",
  add: "M10 4.5v11M4.5 10h11",
  duplicate: "M7 7h9v9H7zM4 13V4h9",
  remove: "M4 6h12M8 6V4h4v2M6 6l.8 10h6.4L14 6M8.7 9v4M11.3 9v4",
  picture: "M3 4.5h14v11H3zM6.5 4.5v11M10 4.5v11M13.5 4.5v11",
  "save-picture": "M3 3.5h14v8.5M3 3.5V13h5M3 11l4-4 3 3 2-2 2 2M13.5 12v5M11 14.8l2.5 2.5 2.5-2.5",
  equipotentials: "M4.5 3.5c3 4 3 9 0 13M10 3.5v13M15.5 3.5c-3 4-3 9 0 13",
  "field-lines": "M3 10h13M13.5 7.5 16 10l-2.5 2.5M3 6.5c4-3 9-3 13-.5M3 13.5c4 3 9 3 13 .5",
  points: "M5.5 5a1.7 1.7 0 1 0 .01 0M14 3.2a1.7 1.7 0 1 0 .01 0M12.5 12.5a1.7 1.7 0 1 0 .01 0",
  tags: "M3 6h9l5 4-5 4H3zM6.5 8.5v3M5 10h3",
  snap: "M3 7h14M3 13h14M7 3v14M13 3v14",
  "align-left": "M3.5 3v14M6 5.5h10v3H6zM6 11.5h6v3H6z",
  "align-centre": "M10 3v2.5M10 8.5v3M10 14.5V17M4.5 5.5h11v3h-11zM6.5 11.5h7v3h-7z",
  "align-right": "M16.5 3v14M4 5.5h10v3H4zM8 11.5h6v3H8z",
  "align-top": "M3 3.5h14M5.5 6v10h3V6zM11.5 6v6h3V6z",
  "align-middle": "M3 10h2.5M8.5 10h3M14.5 10H17M5.5 4.5v11h3v-11zM11.5 6.5v7h3v-7z",
  "align-bottom": "M3 16.5h14M5.5 4v10h3V4zM11.5 8v6h3V8z",
  "space-x": "M3.5 3.5v13M16.5 3.5v13M8.5 6h3v8h-3z",
  "space-y": "M3.5 3.5h13M3.5 16.5h13M6 8.5v3h8v-3z",
  "mirror-x": "M10 3v3M10 8.5v3M10 14v3M7.5 6v8H3zM12.5 6v8H17z",
  "mirror-y": "M3 10h3M8.5 10h3M14 10h3M6 7.5h8V3zM6 12.5h8V17z",
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
