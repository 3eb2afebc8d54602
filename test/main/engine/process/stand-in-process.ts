/** An engine process without data, for tests: entry like main/engine/process/engine-process. */
import { parentProcessPort } from "../../../../main/engine/process/process-port";
import { serveProcess } from "../../../../main/engine/process/serve-process";
import { createStandIn } from "../../../core/contract/stand-in-engine";

serveProcess(createStandIn(200), parentProcessPort(process), (code) => process.exit(code));
