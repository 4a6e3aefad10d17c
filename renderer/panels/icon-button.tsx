import { Icon, type IconName } from "./icons";

export interface IconButtonProps {
  readonly icon: IconName;
  /** What those hear who do not see the drawing. */
  readonly name: string;
  /** What the pointer shows; the name where absent. */
  readonly hint?: string;
  readonly disabled?: boolean;
  /** For a button that stays down. */
  readonly pressed?: boolean;
  /** A word beside the drawing, where there is room for it. */
  readonly word?: string;
  readonly onPress: () => void;
}

/** A button with a drawing and a name. */
export function IconButton({ icon, name, hint = name, disabled = false, pressed, word, onPress }: IconButtonProps) {
  return (
    <button
      type="button"
      className={word === undefined ? "quiet" : "quiet worded"}
      aria-label={name}
      aria-pressed={pressed}
      title={hint}
      disabled={disabled}
      onClick={onPress}
    >
      <Icon name={icon} />
      {word !== undefined && <span className="word">{word}</span>}
    </button>
  );
}
