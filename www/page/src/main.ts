/** Starts the page. */
import workerSource from "../generated/worker.txt";

console.log(workerSource.length);
