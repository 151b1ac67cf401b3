process.on("exit", () => {
  const { user, system } = process.cpuUsage();
  const { maxRSS } = process.resourceUsage();
  process.stderr.write(`usage ${Math.round((user + system) / 1000)} ms ${Math.round(maxRSS / 1024)} MB\n`);
});
