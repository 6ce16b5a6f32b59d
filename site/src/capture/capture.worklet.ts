/** Passes every block of the microphone on to the page. Runs in the audio thread. */

declare const registerProcessor: (name: string, processor: new () => AudioWorkletProcessor) => void;

declare abstract class AudioWorkletProcessor {
  readonly port: MessagePort;
}

class Capture extends AudioWorkletProcessor {
  process(inputs: Float32Array[][]): boolean {
    const channel = inputs[0]?.[0];
    if (channel) {
      const copy = channel.slice();
      this.port.postMessage(copy, [copy.buffer]);
    }
    return true;
  }
}

registerProcessor('hoopsheet-capture', Capture);
