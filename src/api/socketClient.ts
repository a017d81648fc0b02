// Its own module, so that the part of the page that comes later carries nothing but this.
export { io } from 'socket.io-client';
