import { Select } from "../controls/Select";
import type { GroundChoice } from "./theme";

const choices = [
  { value: "auto", title: "Auto" },
  { value: "paper", title: "Paper" },
  { value: "night", title: "Night" },
] as const;

interface GroundSwitchProps {
  readonly choice: GroundChoice;
  readonly onChoose: (choice: GroundChoice) => void;
}

/** Light or dark ground; "Auto" follows the system. */
export function GroundSwitch({ choice, onChoose }: GroundSwitchProps) {
  return (
    <div className="ground-switch">
      <Select<GroundChoice> label="Ground" value={choice} choices={choices} onChoose={onChoose} />
    </div>
  );
}
