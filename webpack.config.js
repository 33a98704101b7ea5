import { createHash } from 'node:crypto';
import { chmodSync, existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { EsbuildPlugin } from 'esbuild-loader';
import webpack from 'webpack';

const path = (relative) => fileURLToPath(new URL(relative, import.meta.url));
const { version } = JSON.parse(readFileSync(path('package.json'), 'utf8'));

// Stands in the bundle until its text is known; as long as what replaces it, so that nothing moves.
const buildMark = `${version}+@@@@@@@@`;

const common = (target) => ({
  mode: 'production',
  devtool: false,
  resolve: { extensions: ['.ts', '.js', '.json'] },
  module: { rules: [{ test: /\.ts$/, loader: 'esbuild-loader', options: { target } }] },
  optimization: { splitChunks: false, runtimeChunk: false, minimizer: [new EsbuildPlugin({ target })] },
  performance: { hints: false },
});

const stamp = () => [
  new webpack.DefinePlugin({ ROOTSUM_VERSION: JSON.stringify(version), ROOTSUM_BUILD: JSON.stringify(buildMark) }),
  new webpack.optimize.LimitChunkCountPlugin({ maxChunks: 1 }),
];

const afterMinifying = webpack.Compilation.PROCESS_ASSETS_STAGE_OPTIMIZE_SIZE + 1;

/** Replaces the mark by the version and a hash of the asset's own text: the same sources give the same build, with no time in it. */
class StampBuild {
  apply(compiler) {
    compiler.hooks.thisCompilation.tap('StampBuild', (compilation) => {
      compilation.hooks.processAssets.tap({ name: 'StampBuild', stage: afterMinifying }, (assets) => {
        for (const name of Object.keys(assets).filter((file) => /\.c?js$/.test(file))) {
          const text = assets[name].source().toString();
          const hash = createHash('sha256').update(text).digest('hex').slice(0, 8);
          compilation.updateAsset(name, new webpack.sources.RawSource(text.replaceAll(buildMark, `${version}+${hash}`)));
        }
      });
    });
  }
}

/** Emits functions.json, taken from the very bundle that registers the functions. */
class EmitMetadata {
  apply(compiler) {
    compiler.hooks.thisCompilation.tap('EmitMetadata', (compilation) => {
      compilation.hooks.processAssets.tap({ name: 'EmitMetadata', stage: afterMinifying + 1 }, (assets) => {
        if (!assets['functions.js']) return; // a build that failed
        const run = new Function('CustomFunctions', 'RootsumMetadata', assets['functions.js'].source().toString());
        const emit = (json) => compilation.emitAsset('functions.json', new webpack.sources.RawSource(json));
        run({ associate: () => undefined, Error }, emit);
      });
    });
  }
}

/** Makes the command executable, for `npx rootsum` in the checkout. */
class Executable {
  apply(compiler) {
    compiler.hooks.afterEmit.tap('Executable', ({ outputOptions }) => chmodSync(join(outputOptions.path, 'rootsum.cjs'), 0o755));
  }
}

const functionsBundle = {
  ...common('es2020'),
  name: 'functions',
  target: ['web', 'es2020'],
  entry: path('functions/entry.ts'),
  output: { path: path('dist'), filename: 'functions.js' },
  plugins: [...stamp(), new StampBuild(), new EmitMetadata()],
};

const commandEntry = path('addin/desk/command/main.ts');

const commandBundle = {
  ...common('node20'),
  name: 'command',
  target: 'node20',
  entry: commandEntry,
  output: { path: path('dist'), filename: 'rootsum.cjs' },
  plugins: [...stamp(), new webpack.BannerPlugin({ banner: '#!/usr/bin/env node', raw: true }), new StampBuild(), new Executable()],
};

const deskBundle = {
  ...common('es2022'),
  name: 'desk',
  target: ['web', 'es2022'],
  entry: path('addin/desk/page/main.ts'),
  output: { path: path('dist'), filename: 'desk.js', chunkFilename: 'desk-[name].js', chunkLoadingGlobal: 'rootsumDesk', publicPath: 'auto' },
  optimization: { ...common('es2022').optimization, chunkIds: 'named' },
  plugins: [new webpack.DefinePlugin({ ROOTSUM_VERSION: JSON.stringify(version), ROOTSUM_BUILD: JSON.stringify(version) })],
};

const excelEntry = path('addin/excel/entry.ts');

const excelBundle = {
  ...deskBundle,
  name: 'excel',
  entry: excelEntry,
  output: { path: path('dist'), filename: 'excel.js', chunkFilename: 'excel-[name].js', chunkLoadingGlobal: 'rootsumExcel', publicPath: 'auto' },
};

export default [functionsBundle, deskBundle, ...(existsSync(excelEntry) ? [excelBundle] : []), ...(existsSync(commandEntry) ? [commandBundle] : [])];
