import { Component } from 'preact';
import { html } from 'htm/preact';

/** A part of the screen that fails says so and leaves the rest at work; nothing typed depends on it.
 * @extends {Component<{ at: string, children?: any }, { trouble: string }>} */
export class Guard extends Component {
  state = { trouble: '' };

  /** @param {any} error */
  componentDidCatch(error) {
    console.error(error);
    this.setState({ trouble: String(error?.message ?? error) });
  }

  /** Another screen gets its own chance. @param {{ at: string }} before */
  componentDidUpdate(before) {
    if (before.at !== this.props.at && this.state.trouble) this.setState({ trouble: '' });
  }

  render() {
    if (!this.state.trouble) return this.props.children;
    return html`<main class="page"><p class="trouble"
      role="alert">This screen could not be shown. <span>${this.state.trouble}. What you typed is kept.</span></p>
      <p><a class="button" href="#/" onClick=${() => this.setState({ trouble: '' })}>All cases</a></p></main>`;
  }
}
