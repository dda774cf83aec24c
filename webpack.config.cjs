/**
 * Bundles the server programs into dist/: one main.js a program and one file a worker thread beside it.
 * Packages stay outside the bundle (they are required from node_modules); our own libs go in.
 */
const fs = require('node:fs');
const path = require('node:path');
const nodeExternals = require('webpack-node-externals');

const libs = ['baseline', 'control', 'scoring', 'workbook', 'contracts', 'data', 'mail', 'platform'];

/** Every apps/<app>/src/main.ts, every *.thread.ts, every tools/<tool>/main.ts and tools/<tool>/<part>/main.ts is an entry. */
function entries() {
  const found = {};
  for (const app of ['api', 'worker', 'mail-catcher']) {
    const src = path.join(__dirname, 'apps', app, 'src');
    if (!fs.existsSync(path.join(src, 'main.ts'))) continue;
    found[`apps/${app}/main`] = path.join(src, 'main.ts');
    for (const file of fs.readdirSync(src, { recursive: true })) {
      if (file.endsWith('.thread.ts')) found[`threads/${path.basename(file, '.ts')}`] = path.join(src, file);
    }
  }
  const tools = path.join(__dirname, 'tools');
  for (const tool of fs.existsSync(tools) ? fs.readdirSync(tools) : []) {
    if (!fs.statSync(path.join(tools, tool)).isDirectory()) continue;
    for (const part of ['', ...fs.readdirSync(path.join(tools, tool))]) {
      const main = path.join(tools, tool, part, 'main.ts');
      if (fs.existsSync(main)) found[`tools/${tool}${part && `-${part}`}`] = main;
    }
  }
  const migrate = path.join(__dirname, 'database', 'main.ts');
  if (fs.existsSync(migrate)) found['database/main'] = migrate;
  return found;
}

module.exports = {
  mode: 'none',
  target: 'node20',
  devtool: 'source-map',
  entry: entries(),
  output: {
    path: path.resolve(__dirname, process.env.EBBLINE_DIST || 'dist'),
    filename: '[name].js',
    libraryTarget: 'commonjs2',
  },
  externals: [nodeExternals()],
  node: { __dirname: false, __filename: false },
  resolve: {
    extensions: ['.ts', '.js', '.json'],
    alias: Object.fromEntries(
      libs.map((name) => [`@app/${name}$`, path.join(__dirname, 'libs', name, 'src', 'index.ts')]),
    ),
  },
  module: {
    // What a program looks for in node_modules by createRequire is looked for when it runs.
    parser: { javascript: { createRequire: false } },
    rules: [
      {
        test: /\.ts$/,
        use: {
          loader: 'swc-loader',
          options: {
            jsc: {
              parser: { syntax: 'typescript', decorators: true },
              transform: { legacyDecorator: true, decoratorMetadata: true },
              keepClassNames: true,
              target: 'es2022',
            },
          },
        },
      },
    ],
  },
  cache: {
    type: 'filesystem',
    cacheDirectory: path.join(__dirname, 'node_modules', '.cache', 'webpack'),
    buildDependencies: { config: [__filename] },
  },
  stats: 'errors-warnings',
};
