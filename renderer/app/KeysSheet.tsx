import { Button } from "../controls/Button";
import { Sheet } from "../controls/Sheet";
import { keyHelp } from "../state/keys";

export function KeysSheet({ onClose }: { readonly onClose: () => void }) {
  return (
    <Sheet title="Keys" onClose={onClose}>
      <dl className="key-list">
        {keyHelp.map(({ keys, does }) => (
          <div className="key-row" key={does}>
            <dt>
              {keys.map((key) => (
                <kbd key={key}>{key}</kbd>
              ))}
            </dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
      <div className="sheet-actions">
        <Button kind="main" onPress={onClose}>
          Close
        </Button>
      </div>
    </Sheet>
  );
}
