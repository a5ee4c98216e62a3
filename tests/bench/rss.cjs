// Preloaded into a measured process: leaves its peak resident memory, in kB, and the time of processors that it took, in us, in
// the file that BENCH_RSS names.
process.on('exit', () => {
  const { maxRSS, userCPUTime, systemCPUTime } = process.resourceUsage();
  require('node:fs').writeFileSync(process.env.BENCH_RSS, `${maxRSS} ${userCPUTime + systemCPUTime}`);
});
