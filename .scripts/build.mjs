/** Builds bundles of webpack.config.mjs by name; ends the program with the tool's report if one fails. */
import webpack from 'webpack';
import configurations from '../webpack.config.mjs';

export async function build(names) {
  const wanted = (await configurations()).filter(({ name }) => names.includes(name));
  const compiler = webpack(wanted);
  const stats = await new Promise((done, fail) =>
    compiler.run((error, result) => (error ? fail(error) : done(result))),
  );
  await new Promise((done) => compiler.close(done));
  const report = stats.toString({ preset: 'errors-warnings', colors: process.stdout.isTTY });
  if (stats.hasErrors()) {
    console.error(report);
    process.exit(1);
  }
  if (stats.hasWarnings()) console.log(report);
}
