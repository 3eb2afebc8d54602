import { execFileSync } from "node:child_process";

const packages = ["numpy", "scipy", "gsw", "netcdf4", "xarray", "cftime"].map((name) => `python3-${name}`);
/** Debian's own Python, whatever comes first on the PATH. */
export const python = "/usr/bin/python3";

function hasPackages(): boolean {
  try {
    execFileSync(python, ["-c", "import numpy, scipy, gsw, netCDF4, xarray, cftime"], { stdio: "ignore" });
    return true;
  } catch {
    return false;
  }
}

/** Makes sure that the reference libraries are there, installing them where the system allows; else one line that says what to do. */
export function requirePython(): void {
  if (hasPackages()) return;
  try {
    if (process.getuid?.() === 0) {
      execFileSync("apt-get", ["update"], { stdio: "ignore" });
      execFileSync("apt-get", ["install", "-y", "--no-install-recommends", ...packages], { stdio: "ignore" });
    }
  } catch {
    // What follows says what is missing.
  }
  if (!hasPackages())
    throw new Error(`The tests compare with Python's libraries: apt-get install ${packages.join(" ")}`);
}

/** Runs a script that prints JSON and gives its value. */
export function pythonJson<T>(script: string, input = ""): T {
  const text = execFileSync(python, ["-W", "ignore", "-c", script], { input, maxBuffer: 1 << 29 }).toString();
  return JSON.parse(text) as T;
}
