/** A parent that starts an engine process, prints its id and goes on; for the test that kills it. */
import { startEngineHost } from "../../../../main/engine/process/engine-host";
import { forkStandIn } from "./fork-stand-in";

const host = startEngineHost(forkStandIn());
await host.engine.open({ paths: [] });
process.stdout.write(`${host.pid()}\n`);
