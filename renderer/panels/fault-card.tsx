import { Component, type ReactNode, useState } from "react";
import type { Host } from "../../shared-types/host";
import { texts } from "../texts/texts";

const words = texts.window.fault;

export interface FaultCardProps {
  readonly host: Host;
  readonly title: string;
  readonly message: string;
  /** Stands where its desk would be, not over the window. */
  readonly inPlace?: boolean;
  readonly onAgain: () => void;
}

/** A fault of ours: what happened, a way on, and the details for a report. */
export function FaultCard({ host, title, message, inPlace = false, onAgain }: FaultCardProps) {
  const [copied, setCopied] = useState(false);
  const copy = async (): Promise<void> => setCopied(await host.copyText(`${title}\n${message}\n${await host.details()}`));
  return (
    <section className={`message message-problem${inPlace ? " in-place" : " fault"}`} role="alertdialog" aria-label={title}>
      <h2>{title}</h2>
      <p>{message}</p>
      <div className="choices">
        <button type="button" onClick={onAgain}>
          {words.again}
        </button>
        <button type="button" onClick={() => void copy()}>
          {copied ? words.copied : words.copy}
        </button>
      </div>
    </section>
  );
}

interface FaultGuardProps {
  readonly host: Host;
  readonly children: ReactNode;
}

/** Keeps a fault in one desk from taking the window down: the rest stays usable. */
export class FaultGuard extends Component<FaultGuardProps, { readonly fault: string | null }> {
  override state = { fault: null };

  static getDerivedStateFromError(error: unknown): { fault: string } {
    return { fault: error instanceof Error ? error.message : String(error) };
  }

  override componentDidCatch(error: Error): void {
    this.props.host.log({ level: "error", message: `${error.message}\n${error.stack ?? ""}`.slice(0, 8000) });
  }

  override render(): ReactNode {
    const { fault } = this.state;
    if (fault === null) return this.props.children;
    return <FaultCard host={this.props.host} title={words.panel} message={fault} inPlace onAgain={() => this.setState({ fault: null })} />;
  }
}
