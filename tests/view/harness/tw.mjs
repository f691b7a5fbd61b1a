export default {
  content: [{ raw: '' }],
  theme: {
    colors: {
      ink: '#1d2733',
      'ink-2': '#434d58',
      'ink-3': '#59626c',
      pair: '#4b535c',
      etch: '#3d4146',
      glass: '#6b6e72',
      edge: '#7b7f84',
      'tape-edge': '#8d9094',
      slab: '#d6d6d6',
      'slab-edge': '#9c9c9c',
      apron: '#ededed',
      grout: '#e6e6e6',
      tile: '#fafafa',
      hair: '#d9d9d7',
      danger: '#96171b',
      cobalt: { DEFAULT: '#1b3f9c', deep: '#143080', down: '#0e2464', tint: '#e8ecf5' },
    },
  },
};
