/** Resolution of the backdrop, as a share of the picture's. */
export const BACKDROP_SCALE = 0.45;

/** Thin layer over WebGL 2: a picture, a texture with depth to draw the swimmer into, and shader programmes. */
export class Canvas3d {
  readonly gl: WebGL2RenderingContext;
  private readonly samples: WebGLFramebuffer;
  private readonly resolved: WebGLFramebuffer;
  private readonly texture: WebGLTexture;
  private readonly backdrop: WebGLFramebuffer;
  private readonly backdropTexture: WebGLTexture;

  constructor(
    canvas: HTMLCanvasElement | OffscreenCanvas,
    private readonly width: number,
    private readonly height: number,
  ) {
    canvas.width = width;
    canvas.height = height;
    const gl = canvas.getContext('webgl2', { alpha: false, antialias: false, preserveDrawingBuffer: true });
    if (!(gl instanceof WebGL2RenderingContext)) throw new Error('This browser draws no WebGL 2.');
    this.gl = gl;
    this.texture = this.target(width, height);
    this.backdropTexture = this.target(Math.ceil(width * BACKDROP_SCALE), Math.ceil(height * BACKDROP_SCALE));
    this.samples = this.buffers(4);
    this.resolved = this.framebufferOf(this.texture);
    this.backdrop = this.framebufferOf(this.backdropTexture);
  }

  programme(vertex: string, fragment: string): Programme {
    return new Programme(this.gl, vertex, fragment);
  }

  intoTexture(): void {
    const { gl } = this;
    gl.bindFramebuffer(gl.FRAMEBUFFER, this.samples);
    gl.viewport(0, 0, this.width, this.height);
    gl.clearColor(0, 0, 0, 0);
    gl.clear(gl.COLOR_BUFFER_BIT | gl.DEPTH_BUFFER_BIT);
    gl.enable(gl.DEPTH_TEST);
  }

  /** Ends the drawing of the swimmer. */
  resolve(): void {
    const { gl, width, height } = this;
    gl.bindFramebuffer(gl.READ_FRAMEBUFFER, this.samples);
    gl.bindFramebuffer(gl.DRAW_FRAMEBUFFER, this.resolved);
    gl.blitFramebuffer(0, 0, width, height, 0, 0, width, height, gl.COLOR_BUFFER_BIT, gl.NEAREST);
    gl.disable(gl.DEPTH_TEST);
    gl.disable(gl.BLEND);
  }

  /** What is drawn next becomes the backdrop. */
  intoBackdrop(): void {
    const { gl } = this;
    gl.bindFramebuffer(gl.FRAMEBUFFER, this.backdrop);
    gl.viewport(0, 0, Math.ceil(this.width * BACKDROP_SCALE), Math.ceil(this.height * BACKDROP_SCALE));
  }

  /** What is drawn next is the picture; the swimmer is texture 0, the backdrop texture 1. */
  intoPicture(): void {
    const { gl } = this;
    gl.bindFramebuffer(gl.FRAMEBUFFER, null);
    gl.viewport(0, 0, this.width, this.height);
    for (const [unit, texture] of [this.texture, this.backdropTexture].entries()) {
      gl.activeTexture(gl.TEXTURE0 + unit);
      gl.bindTexture(gl.TEXTURE_2D, texture);
    }
  }

  pixels(): Uint8Array {
    const bytes = new Uint8Array(this.width * this.height * 4);
    this.gl.readPixels(0, 0, this.width, this.height, this.gl.RGBA, this.gl.UNSIGNED_BYTE, bytes);
    return bytes;
  }

  private target(width: number, height: number): WebGLTexture {
    const { gl } = this;
    const texture = gl.createTexture();
    gl.bindTexture(gl.TEXTURE_2D, texture);
    gl.texStorage2D(gl.TEXTURE_2D, 1, gl.RGBA8, width, height);
    gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MIN_FILTER, gl.LINEAR);
    gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_WRAP_S, gl.CLAMP_TO_EDGE);
    gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_WRAP_T, gl.CLAMP_TO_EDGE);
    return texture;
  }

  private framebufferOf(texture: WebGLTexture): WebGLFramebuffer {
    const { gl } = this;
    const frame = gl.createFramebuffer();
    gl.bindFramebuffer(gl.FRAMEBUFFER, frame);
    gl.framebufferTexture2D(gl.FRAMEBUFFER, gl.COLOR_ATTACHMENT0, gl.TEXTURE_2D, texture, 0);
    return frame;
  }

  private buffers(samples: number): WebGLFramebuffer {
    const { gl } = this;
    const frame = gl.createFramebuffer();
    gl.bindFramebuffer(gl.FRAMEBUFFER, frame);
    for (const [format, point] of [
      [gl.RGBA8, gl.COLOR_ATTACHMENT0],
      [gl.DEPTH_COMPONENT24, gl.DEPTH_ATTACHMENT],
    ] as const) {
      const buffer = gl.createRenderbuffer();
      gl.bindRenderbuffer(gl.RENDERBUFFER, buffer);
      gl.renderbufferStorageMultisample(gl.RENDERBUFFER, samples, format, this.width, this.height);
      gl.framebufferRenderbuffer(gl.FRAMEBUFFER, point, gl.RENDERBUFFER, buffer);
    }
    const state = gl.checkFramebufferStatus(gl.FRAMEBUFFER);
    if (state !== gl.FRAMEBUFFER_COMPLETE)
      throw new Error(`The buffer to draw the swimmer into is not complete (${state}).`);
    return frame;
  }
}

/** A pair of shaders with the values they take. */
export class Programme {
  private readonly program: WebGLProgram;
  private readonly vertices: WebGLBuffer;
  private readonly indices: WebGLBuffer;

  constructor(
    private readonly gl: WebGL2RenderingContext,
    vertex: string,
    fragment: string,
  ) {
    this.program = gl.createProgram();
    gl.attachShader(this.program, this.compile(gl.VERTEX_SHADER, vertex));
    gl.attachShader(this.program, this.compile(gl.FRAGMENT_SHADER, fragment));
    gl.linkProgram(this.program);
    if (!gl.getProgramParameter(this.program, gl.LINK_STATUS))
      throw new Error(gl.getProgramInfoLog(this.program) ?? 'link');
    this.vertices = gl.createBuffer();
    this.indices = gl.createBuffer();
  }

  use(): void {
    this.gl.useProgram(this.program);
  }

  /** Sets a number or a vector; names that the shader does not use are passed over. */
  set(name: string, ...values: readonly number[]): void {
    const place = this.gl.getUniformLocation(this.program, name);
    const [x = 0, y = 0, z = 0, w = 0] = values;
    if (values.length === 1) this.gl.uniform1f(place, x);
    else if (values.length === 2) this.gl.uniform2f(place, x, y);
    else if (values.length === 3) this.gl.uniform3f(place, x, y, z);
    else this.gl.uniform4f(place, x, y, z, w);
  }

  setUnit(name: string, unit: number): void {
    this.gl.uniform1i(this.gl.getUniformLocation(this.program, name), unit);
  }

  setFlag(name: string, on: boolean): void {
    this.gl.uniform1i(this.gl.getUniformLocation(this.program, name), on ? 1 : 0);
  }

  drawTriangles(
    vertices: readonly number[],
    triangles: readonly number[],
    stride: number,
    fields: Readonly<Record<string, number>>,
  ): void {
    const { gl } = this;
    this.lay(vertices, stride, fields);
    gl.disable(gl.BLEND);
    gl.depthMask(true);
    gl.bindBuffer(gl.ELEMENT_ARRAY_BUFFER, this.indices);
    gl.bufferData(gl.ELEMENT_ARRAY_BUFFER, new Uint32Array(triangles), gl.STREAM_DRAW);
    gl.drawElements(gl.TRIANGLES, triangles.length, gl.UNSIGNED_INT, 0);
  }

  /** Points blended over what is there; colours come multiplied by their coverage. */
  drawPoints(vertices: readonly number[], stride: number, fields: Readonly<Record<string, number>>): void {
    const { gl } = this;
    this.lay(vertices, stride, fields);
    gl.enable(gl.BLEND);
    gl.blendFunc(gl.ONE, gl.ONE_MINUS_SRC_ALPHA);
    gl.depthMask(false);
    gl.drawArrays(gl.POINTS, 0, vertices.length / stride);
    gl.depthMask(true);
    gl.disable(gl.BLEND);
  }

  private lay(vertices: readonly number[], stride: number, fields: Readonly<Record<string, number>>): void {
    const { gl } = this;
    gl.bindBuffer(gl.ARRAY_BUFFER, this.vertices);
    gl.bufferData(gl.ARRAY_BUFFER, new Float32Array(vertices), gl.STREAM_DRAW);
    for (let index = 0; index < 8; index += 1) gl.disableVertexAttribArray(index);
    let offset = 0;
    for (const [name, length] of Object.entries(fields)) {
      const place = gl.getAttribLocation(this.program, name);
      if (place >= 0) {
        gl.enableVertexAttribArray(place);
        gl.vertexAttribPointer(place, length, gl.FLOAT, false, stride * 4, offset * 4);
      }
      offset += length;
    }
  }

  private compile(kind: GLenum, source: string): WebGLShader {
    const shader = this.gl.createShader(kind);
    if (!shader) throw new Error('No shader could be made.');
    this.gl.shaderSource(shader, source);
    this.gl.compileShader(shader);
    if (!this.gl.getShaderParameter(shader, this.gl.COMPILE_STATUS))
      throw new Error(this.gl.getShaderInfoLog(shader) ?? 'compile');
    return shader;
  }
}
