// What tests may read: window.steelyard. No way in; tests act with the mouse and the keyboard.

function makeInspectable() {
    let program = null;
    let resting = () => false;
    const inspectable = {
        items: () => (program ? JSON.parse(program.items()) : []),
        results: () => (program ? program.results() : ''),
        get frame() {
            return program ? program.frames() : 0;
        },
        get idle() {
            return program !== null && resting() && program.idle();
        },
    };
    Object.defineProperty(window, 'steelyard', { value: Object.freeze(inspectable) });
    return (started, isResting) => {
        program = started;
        resting = isResting;
    };
}
